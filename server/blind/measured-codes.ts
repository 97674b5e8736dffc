import type { Tx } from '../db/transaction.ts';
import { OpeningProof } from './sealed.ts';
import { readCodeKey } from './secrets.store.ts';

/**
 * The blind codes of the two cables, in the order of their numbers, for whoever measures each at the load: what stands on
 * the sleeves, and nothing of which is which.
 */
export async function codesToMeasure(tx: Tx, studyId: string): Promise<string[]> {
  const sealed = await readCodeKey(tx, studyId);
  if (sealed === null) return [];
  const { rows } = sealed.open(new OpeningProof('cue'));
  return rows
    .filter(({ cable }) => cable < 2)
    .map(({ code }) => code)
    .sort();
}
