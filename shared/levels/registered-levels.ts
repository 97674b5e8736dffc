import { z } from 'zod';

// Limits of practice, in thousandths of a decibel at 1 kHz. Common practice, no source: 0.1 dB is the usual strict figure.

/** What a careful match reaches. */
export const targetMilliDb = 50;
/** What counts as matched unless the protocol says otherwise. */
export const usualToleranceMilliDb = 100;
/** Beyond this a study that registers matched levels does not start. */
export const mostMilliDb = 200;
/** A level that moves by more than this over a session flags it. */
export const driftMilliDb = 100;

/** Where gain is compared. */
export const gainHz = 1000;
/** Where response is read, relative to 1 kHz. */
export const usualFrequencies = [20, 50, 100, 315, 1000, 3150, 6300, 10_000, 16_000, 20_000] as const;

export const levelHandlings = ['as-supplied', 'level-compensated'] as const;
export type LevelHandling = (typeof levelHandlings)[number];

/** How a protocol registers level: what is done about it, how well it must match, where it is measured. */
export const registeredLevels = z
  .strictObject({
    handling: z.enum(levelHandlings, 'Choose how level is handled'),
    toleranceMilliDb: z
      .int('Enter the tolerance as a number')
      .min(10, 'At least 0.01 dB')
      .max(mostMilliDb, 'At most 0.2 dB: beyond that levels do not count as matched'),
    frequenciesHz: z
      .array(z.int('Whole hertz').min(10, 'At least 10 Hz').max(40_000, 'At most 40 kHz'))
      .max(12, 'At most 12 frequencies'),
  })
  .check((check) => {
    const { frequenciesHz } = check.value;
    const isSound = frequenciesHz.includes(gainHz) && new Set(frequenciesHz).size === frequenciesHz.length;
    if (!isSound)
      check.issues.push({
        code: 'custom',
        input: frequenciesHz,
        path: ['frequenciesHz'],
        message: 'Level is compared at 1 kHz: keep it, and each frequency once',
      });
  });
export type RegisteredLevels = z.output<typeof registeredLevels>;

/** How large a difference is: within the target, within the tolerance, to be warned of, or too large to start with. */
export type LevelGrade = 'target' | 'pass' | 'warn' | 'fail';

/** @param differenceMilliDb at least 0 */
export function gradeOf(differenceMilliDb: number, { toleranceMilliDb }: RegisteredLevels): LevelGrade {
  if (differenceMilliDb > mostMilliDb) return 'fail';
  if (differenceMilliDb > toleranceMilliDb) return 'warn';
  return differenceMilliDb <= targetMilliDb ? 'target' : 'pass';
}

export const isWithin = (grade: LevelGrade): boolean => grade === 'target' || grade === 'pass';
