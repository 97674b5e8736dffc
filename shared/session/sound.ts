import { z } from 'zod';
import type { ProctorView } from '../contracts/proctor-live.ts';
import { adviceOn, type SoundLevel, soundLevel } from '../exposure/sound-level.ts';
import { Problem } from '../problem.ts';
import type { SessionState } from './state.ts';

/** What a session puts on the record of how loud it is; the reason is there where it is 90 dBA or more. */
export const soundEvents = {
  'sound-level-recorded': z.strictObject({ session: z.int().min(1), ...soundLevel.shape, reason: z.string() }),
} as const;

export type SoundCommand = SoundLevel & { kind: 'record-sound-level'; reason: string };

const shortestReason = 3;

/** @throws Problem where it is too loud and no reason is given, or the session is over */
export function soundToRecord(state: SessionState, command: SoundCommand): SoundLevel & { reason: string } {
  if (state.phase === 'finished' || state.phase === 'abandoned')
    throw new Problem('wrong-phase', 'The session is over.');
  // Field by field: a command carries more than belongs on a record.
  const { tenthsDba, response, instrument, place } = command;
  const isTooLoud = adviceOn(command) === 'refused';
  if (isTooLoud && command.reason.length < shortestReason)
    throw new Problem(
      'invalid-input',
      'From 90 dBA on hearing is at risk. Turn it down, or say why it must be so loud.',
      [{ pointer: '/reason', detail: 'Say why it must be 90 dBA or more' }],
    );
  return { tenthsDba, response, instrument, place, reason: isTooLoud ? command.reason : '' };
}

/** What the console shows of the sound level: the last that was recorded. */
export function soundFor({ sound }: SessionState): ProctorView['sound'] {
  if (sound === null) return null;
  const { tenthsDba, response, instrument, place } = sound;
  return { tenthsDba, response, instrument, place, advice: adviceOn(sound) };
}
