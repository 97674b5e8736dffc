import { In } from 'typeorm';
import type { Tx } from '../../db/transaction.ts';
import { LevelDuty } from './level-duty.entity.ts';

export function dutyOf(tx: Tx, sessionId: string): Promise<LevelDuty | null> {
  return tx.findOneBy(LevelDuty, { sessionId });
}

export function dutiesOf(tx: Tx, sessionIds: readonly string[]): Promise<LevelDuty[]> {
  return sessionIds.length === 0 ? Promise.resolve([]) : tx.findBy(LevelDuty, { sessionId: In([...sessionIds]) });
}

export async function saveDuty(tx: Tx, duty: LevelDuty): Promise<void> {
  await tx.upsert(LevelDuty, duty, ['sessionId']);
}
