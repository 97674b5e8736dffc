import { In } from 'typeorm';
import type { Tx } from '../../db/transaction.ts';
import { RecordEntry } from '../../ledger/entry.entity.ts';
import { TokenRequest } from '../../timestamps/token-request.entity.ts';
import { Study } from '../studies/study.entity.ts';

/** The session of each of some entries, where it has one. */
export async function sessionsOfEntries(
  tx: Tx,
  studyId: string,
  sequences: readonly number[],
): Promise<Map<number, number | null>> {
  if (sequences.length === 0) return new Map();
  const rows = await tx.find(RecordEntry, {
    select: { studyId: true, sequence: true, sessionNumber: true },
    where: { studyId, sequence: In([...sequences]) },
  });
  return new Map(rows.map(({ sequence, sessionNumber }) => [sequence, sessionNumber]));
}

/** How many heads of an organisation wait for a token, and the one that is asked for next. */
export async function waitingFor(tx: Tx, organisationId: string) {
  const rows = tx
    .createQueryBuilder(TokenRequest, 'request')
    .innerJoin(Study, 'study', 'study.id = request.studyId')
    .where('study.organisationId = :organisationId', { organisationId })
    .orderBy('request.nextAttemptAt', 'ASC');
  return { waiting: await rows.getCount(), next: await rows.getOne() };
}
