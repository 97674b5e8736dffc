import { z } from 'zod';

export const mostTrialsInBlock = 20;

/** Breaks as a study registers them; the block of 20 and ten minutes are common practice, no source. */
export const breaksDraft = z.strictObject({
  trials: z
    .int('Enter trials as a whole number')
    .min(1, 'At least 1')
    .max(mostTrialsInBlock, 'At most 20 trials a block'),
  leastMinutes: z.int('Enter minutes as a whole number').min(1, 'At least 1').max(240, 'At most 240'),
  blocksPerDay: z.int('Enter blocks as a whole number').min(1, 'At least 1').max(10, 'At most 10'),
});
export type RegisteredBreaks = z.output<typeof breaksDraft>;

export const usualBreaks: RegisteredBreaks = { trials: 20, leastMinutes: 10, blocksPerDay: 3 };

/** The same as it is read on a page. */
export function breakFacts(breaks: RegisteredBreaks | undefined): { label: string; value: string }[] {
  if (breaks === undefined) return [];
  const { trials, leastMinutes, blocksPerDay } = breaks;
  return [
    {
      label: 'Breaks',
      value: `after every ${trials} trials, ${leastMinutes} min at least; at most ${blocksPerDay} ${blocksPerDay === 1 ? 'block' : 'blocks'} a day`,
    },
  ];
}
