import type { LevelUnit } from '#shared/levels/level-units.ts';
import {
  type LevelChannel,
  type LevelCheckName,
  type LevelInstrument,
  type LevelRow,
  type MeasuredLevels,
  repeats,
} from '#shared/levels/measured-levels.ts';
import { readReading } from '#shared/levels/read-reading.ts';

/** Where a level is read: a code, a channel, a frequency. */
export type Place = { readonly code: string; readonly channel: LevelChannel; readonly frequencyHz: number };

/** What is being typed; readings as text until they are sent. */
export type TypedLevels = {
  readonly check: LevelCheckName;
  readonly unit: LevelUnit;
  readonly channels: 'stereo' | 'mono';
  readonly instrument: { readonly name: string; readonly bandwidth: string; readonly calibratedOn: string };
  readonly readings: Readonly<Record<string, readonly string[]>>;
};

export const placeKey = ({ code, channel, frequencyHz }: Place) => `${code} ${channel} ${frequencyHz}`;

export const noReadings: readonly string[] = Array.from({ length: repeats }, () => '');

/** Every place that is to be read, frequency by frequency, so that the codes to be compared stand together. */
export function placesOf(
  codes: readonly string[],
  frequenciesHz: readonly number[],
  channels: TypedLevels['channels'],
): Place[] {
  const sides: readonly LevelChannel[] = channels === 'mono' ? ['mono'] : ['left', 'right'];
  return frequenciesHz.flatMap((frequencyHz) =>
    sides.flatMap((channel) => codes.map((code) => ({ code, channel, frequencyHz }))),
  );
}

/** What is wrong in a place: with one of its readings, or that some are missing. */
export function faultAt(readings: readonly string[], unit: LevelUnit): string | null {
  for (const reading of readings) {
    if (reading.trim() === '') continue;
    const read = readReading(reading, unit);
    if ('fault' in read) return read.fault;
  }
  return null;
}

export const isWhole = (readings: readonly string[]) => readings.every((reading) => reading.trim() !== '');

/** The places that are filled and sound, as they go on the record. */
export function rowsOf({ readings, unit }: TypedLevels, places: readonly Place[]): LevelRow[] {
  return places.flatMap((place) => {
    const typed = readings[placeKey(place)] ?? noReadings;
    if (!isWhole(typed) || faultAt(typed, unit) !== null) return [];
    const values = typed.map((reading) => {
      const read = readReading(reading, unit);
      return 'value' in read ? read.value : 0;
    });
    return [{ ...place, readings: values }];
  });
}

/** "100 kHz", "20000", "400 Hz" as hertz; null where it is none. */
export function bandwidthOf(text: string): number | null {
  const parts = /^(\d+(?:[.,]\d+)?)\s*(k|m)?\s*(?:hz)?$/i.exec(text.trim());
  if (parts === null) return null;
  const scale = { k: 1000, m: 1_000_000 }[(parts[2] ?? '').toLowerCase()] ?? 1;
  return Math.round(Number((parts[1] ?? '').replace(',', '.')) * scale);
}

export type InstrumentFaults = { readonly name?: string; readonly bandwidth?: string };

export function instrumentOf({ name, bandwidth, calibratedOn }: TypedLevels['instrument']): {
  instrument: LevelInstrument | null;
  faults: InstrumentFaults;
} {
  const bandwidthHz = bandwidthOf(bandwidth);
  const faults: InstrumentFaults = {
    ...(name.trim().length < 2 ? { name: 'Name the instrument' } : {}),
    ...(bandwidthHz === null || bandwidthHz < 50
      ? { bandwidth: 'Write up to where it reads true, such as 400 Hz or 100 kHz' }
      : {}),
  };
  const isSound = Object.keys(faults).length === 0 && bandwidthHz !== null;
  return {
    instrument: isSound
      ? { name: name.trim(), bandwidthHz, calibratedOn: calibratedOn === '' ? null : calibratedOn }
      : null,
    faults,
  };
}

/** What is typed so far, as a measurement to compare; null while nothing can be. */
export function measuredSoFar(typed: TypedLevels, places: readonly Place[]): MeasuredLevels | null {
  const rows = rowsOf(typed, places);
  if (rows.length === 0) return null;
  const instrument = { name: 'typed', bandwidthHz: 1_000_000, calibratedOn: null };
  return { check: typed.check, unit: typed.unit, instrument, rows };
}
