import { z } from 'zod';
import { levelUnits } from './level-units.ts';

/** When levels are measured. */
export const levelChecks = ['before', 'half-time', 'after'] as const;
export type LevelCheckName = (typeof levelChecks)[number];

export const levelCheckWords: Record<LevelCheckName, string> = {
  before: 'before the session',
  'half-time': 'at half time',
  after: 'after the session',
};

export const levelChannels = ['left', 'right', 'mono'] as const;
export type LevelChannel = (typeof levelChannels)[number];

/** How often a level is read, the cable unplugged in between. */
export const repeats = 3;

const levelRow = z.strictObject({
  code: z.string().regex(/^\d{3}$/, 'A blind code has three digits'),
  channel: z.enum(levelChannels),
  frequencyHz: z.int(),
  /** Whole millionths of a volt, or thousandths of a decibel. */
  readings: z.array(z.int().min(-1_000_000_000).max(1_000_000_000)).length(repeats),
});
export type LevelRow = z.output<typeof levelRow>;

export const levelInstrument = z.strictObject({
  name: z.string().trim().min(2, 'Name the instrument').max(80, 'At most 80 characters'),
  /** Up to where it reads true, as its maker states. */
  bandwidthHz: z
    .int('Enter the bandwidth as a number')
    .min(50, 'At least 50 Hz')
    .max(100_000_000, 'At most 100 MHz, in Hz'),
  /** Null where nobody knows. */
  calibratedOn: z.iso.date('Enter a day, or leave it empty').nullable(),
});
export type LevelInstrument = z.output<typeof levelInstrument>;

/** One measurement of every code, as it was read off. */
export const measuredLevels = z.strictObject({
  check: z.enum(levelChecks, 'Say when it was measured'),
  unit: z.enum(levelUnits, 'Choose the unit'),
  instrument: levelInstrument,
  rows: z.array(levelRow).min(1, 'Enter the readings').max(600, 'At most 600 lines'),
});
export type MeasuredLevels = z.output<typeof measuredLevels>;
