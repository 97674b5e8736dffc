import type { StudyState } from '#shared/contracts/studies.ts';
import type { Rig } from '#shared/protocol/rig-preset.ts';
import { formatNumber, withUnit } from '../../lib/format.ts';

/** Each state in its word, with what it means to whoever waits. */
export const stateWords: Record<StudyState, { word: string; tone: 'neutral' | 'held' | 'now'; meaning: string }> = {
  draft: { word: 'Draft', tone: 'neutral', meaning: 'Anything may still change.' },
  sealed: { word: 'Sealed', tone: 'held', meaning: 'The protocol is fixed; no session has opened yet.' },
  collecting: { word: 'Collecting', tone: 'held', meaning: 'Sessions are being held. Nobody sees a score.' },
  closed: { word: 'Closed', tone: 'held', meaning: 'The registered analysis has run.' },
  published: { word: 'Published', tone: 'held', meaning: 'Anybody can read the result and check it.' },
  shelved: { word: 'Shelved', tone: 'neutral', meaning: 'Closed; no result is published.' },
};

export const rigWords: Record<Rig, string> = {
  loudspeaker: 'Loudspeaker',
  line: 'Line level',
  headphone: 'Headphone',
};

/** Tenths of a per cent as a percentage: 50 is "5 %". */
export function percentOfPerMille(perMille: number): string {
  return withUnit(formatNumber(perMille / 10, 1), '%');
}
