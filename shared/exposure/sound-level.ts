import { z } from 'zod';

// Sound level at the listening position. Common practice, no source: 70 to 80 dBA is recommended for tests by ear.

export const recommendedDba = { from: 70, to: 80 } as const;
export const warnedFromTenths = 830;
export const refusedFromTenths = 900;

export const soundResponses = ['slow', 'leq'] as const;

/** What was read at the listening position while the programme played. */
export const soundLevel = z.strictObject({
  /** A-weighted, in tenths of a decibel. */
  tenthsDba: z
    .int('Enter the level as a number')
    .min(300, 'At least 30 dBA: less is a quiet room')
    .max(1200, 'At most 120 dBA'),
  response: z.enum(soundResponses, 'Say how the meter was set'),
  instrument: z.string().trim().min(2, 'Name the meter').max(80, 'At most 80 characters'),
  place: z.string().trim().min(1, 'Say where it was read').max(60, 'At most 60 characters'),
});
export type SoundLevel = z.output<typeof soundLevel>;

export type SoundAdvice = 'quiet' | 'recommended' | 'loud' | 'warned' | 'refused';

export function adviceOn({ tenthsDba }: Pick<SoundLevel, 'tenthsDba'>): SoundAdvice {
  if (tenthsDba >= refusedFromTenths) return 'refused';
  if (tenthsDba >= warnedFromTenths) return 'warned';
  if (tenthsDba > recommendedDba.to * 10) return 'loud';
  return tenthsDba < recommendedDba.from * 10 ? 'quiet' : 'recommended';
}

export const adviceWords: Record<SoundAdvice, string> = {
  quiet: 'Quieter than the recommended 70 to 80 dBA.',
  recommended: 'Within the recommended 70 to 80 dBA.',
  loud: 'Louder than the recommended 70 to 80 dBA.',
  warned: 'Loud: from 83 dBA on hearing is at risk over a long day. Turn it down if the test allows.',
  refused: 'Too loud: 90 dBA and more is not recorded without a reason, which stays on the record.',
};

/** "78.5 dBA" */
export const dbaText = (tenthsDba: number): string => `${(tenthsDba / 10).toFixed(1)} dBA`;

export const responseWords: Record<SoundLevel['response'], string> = { slow: 'slow', leq: 'Leq' };
