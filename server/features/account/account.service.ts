import { LessThan } from 'typeorm';
import type { SignedInPlace } from '#shared/contracts/account.ts';
import { Problem } from '#shared/problem.ts';
import { pageOfRows } from '../../db/paging.ts';
import { withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import type { OpenConsoles } from '../../http/open-consoles.ts';
import * as signIns from '../../http/sign-in.ts';
import { SignInAttempt } from '../sign-in/sign-in-attempt.entity.ts';

const attemptsKeptMs = 90 * 24 * 60 * 60 * 1000;

type Here = { userId: string; placeId: string };

export async function listPlaces({ db }: Deps, { userId, placeId }: Here): Promise<{ places: SignedInPlace[] }> {
  const places = await signIns.placesOf(db, userId);
  return {
    places: places.map(({ idDigest, browser, address, signedInAt, lastSeenAt }) => ({
      id: idDigest,
      browser,
      address,
      signedInAt: signedInAt.toISOString(),
      lastSeenAt: lastSeenAt.toISOString(),
      here: idDigest === placeId,
    })),
  };
}

export async function endPlace({ db }: Deps, consoles: OpenConsoles, userId: string, placeId: string) {
  if (!(await signIns.endPlace(db, userId, placeId))) throw new Problem('not-found', 'This sign-in has ended already.');
  consoles.end((open) => open.userId === userId && open.placeId === placeId);
  return { ok: true } as const;
}

export async function endOtherPlaces({ db }: Deps, consoles: OpenConsoles, { userId, placeId }: Here) {
  await signIns.endOtherPlaces(db, userId, placeId);
  consoles.end((open) => open.userId === userId && open.placeId !== placeId);
  return { ok: true } as const;
}

export function listAttempts({ db }: Deps, userId: string, page: number) {
  return withTransaction(db, async (tx) => {
    const rows = tx
      .createQueryBuilder(SignInAttempt, 'attempt')
      .where('attempt.userId = :userId', { userId })
      .orderBy('attempt.at', 'DESC')
      .addOrderBy('attempt.id');
    const found = await pageOfRows(rows, page);
    const view = ({ id, at, succeeded, browser, address }: SignInAttempt) => ({
      id,
      at: at.toISOString(),
      succeeded,
      browser,
      address,
    });
    return { ...found, rows: found.rows.map(view) };
  });
}

export async function forgetOldAttempts({ db, clock }: Deps): Promise<void> {
  await db.manager.delete(SignInAttempt, { at: LessThan(new Date(clock.now() - attemptsKeptMs)) });
}
