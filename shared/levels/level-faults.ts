import { gainDifference, levelsOf } from './compare-levels.ts';
import { levelMilliDb, perUnit } from './level-units.ts';
import { dbText, hertzText } from './level-words.ts';
import { type LevelChannel, type LevelRow, type MeasuredLevels, repeats } from './measured-levels.ts';
import type { RegisteredLevels } from './registered-levels.ts';

/** What cannot be accepted, and where in `rows` it is; null where it is in no one line. */
export type LevelFault = { readonly row: number | null; readonly text: string };

/** What may be so, but is more often a mistake: it is asked about. */
export type LevelQuestion = { readonly id: string; readonly text: string };

const placeOf = ({ code, channel, frequencyHz }: Pick<LevelRow, 'code' | 'channel' | 'frequencyHz'>) =>
  `${code}, ${channel}, ${hertzText(frequencyHz)}`;

/** Both channels, or the one there is. */
function channelsIn(rows: readonly LevelRow[]): readonly LevelChannel[] {
  return rows.some(({ channel }) => channel === 'mono') ? ['mono'] : ['left', 'right'];
}

function missingOf(rows: readonly LevelRow[], codes: readonly string[], frequenciesHz: readonly number[]) {
  const known = new Set(rows.map(placeOf));
  const wanted = codes.flatMap((code) =>
    channelsIn(rows).flatMap((channel) => frequenciesHz.map((frequencyHz) => ({ code, channel, frequencyHz }))),
  );
  return wanted.filter((place) => !known.has(placeOf(place)));
}

/**
 * Everything that makes a measurement incomplete or impossible, in plain words.
 *
 * @param codes every blind code that is to be measured
 * @param first the measurement before the session, for one after it; else null
 */
export function levelFaults(
  { rows, unit }: MeasuredLevels,
  codes: readonly string[],
  registered: RegisteredLevels,
  first: MeasuredLevels | null,
): LevelFault[] {
  const seen = new Set<string>();
  const faults: LevelFault[] = rows.flatMap((row, index) => {
    const place = placeOf(row);
    const faultsHere: string[] = [];
    if (!codes.includes(row.code)) faultsHere.push(`${row.code} is no blind code of this study.`);
    if (!registered.frequenciesHz.includes(row.frequencyHz))
      faultsHere.push(`The protocol registers no measurement at ${hertzText(row.frequencyHz)}.`);
    if (seen.has(place)) faultsHere.push(`${place} comes twice.`);
    seen.add(place);
    if (unit === 'V' && row.readings.some((reading) => reading <= 0 || reading > 200 * perUnit('V')))
      faultsHere.push(`${place}: a voltage at a load lies above 0 and up to 200 V.`);
    if (unit !== 'V' && row.readings.some((reading) => reading > 60_000 || reading < -140_000))
      faultsHere.push(`${place}: a level in ${unit} lies between −140 and 60.`);
    return faultsHere.map((text) => ({ row: index, text }));
  });
  const mixed = new Set(rows.map(({ channel }) => (channel === 'mono' ? 'mono' : 'stereo'))).size > 1;
  if (mixed) faults.push({ row: null, text: 'Measure left and right for every code, or mono for every code.' });
  else
    for (const place of missingOf(rows, codes, registered.frequenciesHz))
      faults.push({ row: null, text: `${placeOf(place)} is missing.` });
  if (first !== null && (first.unit === 'dB') !== (unit === 'dB'))
    faults.push({
      row: null,
      text:
        first.unit === 'dB'
          ? 'Before the session levels were measured in relative dB: measure in relative dB again, with the same reference.'
          : `Before the session levels were measured in ${first.unit}: relative dB cannot be compared with it.`,
    });
  return faults;
}

/** Readings of one line may spread by this much, in thousandths of a decibel, before they are asked about. Common practice, no source. */
const spreadMilliDb = 100;
/** Two codes rarely differ by more, in thousandths of a decibel: beyond it a value or a unit is usually wrong. */
const rarelyMilliDb = 3000;
const yearMs = 365 * 86_400_000;

/**
 * Whatever is more often a mistake than not.
 *
 * @param now milliseconds since 1970
 */
export function levelQuestions(measured: MeasuredLevels, now: number): LevelQuestion[] {
  const { rows, unit, instrument } = measured;
  const questions: LevelQuestion[] = [];
  const spread = rows.filter(({ readings }) => {
    const levels = readings.map((reading) => levelMilliDb([reading], unit));
    return Math.max(...levels) - Math.min(...levels) > spreadMilliDb;
  });
  const [worst] = spread;
  if (worst !== undefined)
    questions.push({
      id: 'spread',
      text: `The ${repeats} readings of ${placeOf(worst)}${spread.length === 1 ? '' : ` and ${spread.length - 1} more`} are more than ${dbText(spreadMilliDb)} apart. Is none of them mistyped?`,
    });
  const difference = gainDifference(levelsOf(measured));
  if (difference !== null && difference.milliDb > rarelyMilliDb)
    questions.push({
      id: 'large',
      text: `${difference.codes[0]} and ${difference.codes[1]} differ by ${dbText(difference.milliDb)}. Are all values in ${unit === 'V' ? 'volts' : unit}?`,
    });
  const beyond = [...new Set(rows.map(({ frequencyHz }) => frequencyHz))].filter((hz) => hz > instrument.bandwidthHz);
  if (beyond.length > 0)
    questions.push({
      id: 'bandwidth',
      text: `${beyond.map(hertzText).join(', ')}: beyond the ${hertzText(instrument.bandwidthHz)} up to which the instrument reads true. Keep these readings?`,
    });
  const { calibratedOn } = instrument;
  if (calibratedOn === null)
    questions.push({ id: 'calibration', text: 'No day of calibration is given. Does nobody know it?' });
  else if (Date.parse(calibratedOn) > now + 86_400_000)
    questions.push({ id: 'calibration', text: 'The day of calibration is still to come. Is it right?' });
  else if (now - Date.parse(calibratedOn) > 2 * yearMs)
    questions.push({
      id: 'calibration',
      text: 'The instrument was calibrated more than two years ago. Is that right?',
    });
  return questions;
}
