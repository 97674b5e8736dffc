import { z } from 'zod';
import { headProofs } from '../ledger/head-proofs.ts';
import { moments } from '../ledger/moments.ts';
import { endpoint } from './endpoint.ts';
import { organisationParams, thingParams } from './organisation-params.ts';

/** Said wherever a local authority's token shows. */
export const localTimeWords =
  'The local authority runs on the same machine as this Fairlead: its tokens prove nothing about time.';

/** A signed head of a study's record, and the time that was stamped on it. */
export const signedHead = z.strictObject({
  /** The entry that was the head. */
  sequence: z.int(),
  head: z.string(),
  moment: z.enum(moments),
  /** The session that the moment belongs to. */
  session: z.int().nullable(),
  /** When it was signed, by the signer's clock. */
  at: z.iso.datetime(),
  /** Fingerprint of the key. */
  key: z.string(),
  /** Null while the authority has not answered. */
  token: z
    .strictObject({
      authority: z.string(),
      isLocal: z.boolean(),
      time: z.iso.datetime(),
      /** From the signature to the token, in milliseconds; below 0 where the clocks disagree. */
      gapMs: z.int(),
    })
    .nullable(),
});
export type SignedHead = z.output<typeof signedHead>;

const units = [
  { name: 'day', ms: 86_400_000 },
  { name: 'hour', ms: 3_600_000 },
  { name: 'minute', ms: 60_000 },
] as const;

/** How far a token lies from its signature, in words. */
export function gapWords(gapMs: number): string {
  const length = Math.abs(gapMs);
  const unit = units.find(({ ms }) => length >= 2 * ms);
  const count = Math.round(length / (unit?.ms ?? 1000));
  const far = `${count} ${unit?.name ?? 'second'}${count === 1 ? '' : 's'}`;
  if (gapMs < -1000) return `${far} before the signature: the two clocks disagree`;
  return length < 1000 ? 'within a second of the signature' : `${far} after the signature`;
}

/** How the tokens of an organisation's heads stand. */
export const timeState = z.strictObject({
  /** Null where no authority is asked. */
  authority: z.strictObject({ name: z.string(), isLocal: z.boolean() }).nullable(),
  /** Signed heads that have no token yet. */
  waiting: z.int(),
  /** What went wrong at the last attempt of one that waits. */
  lastError: z.string().nullable(),
  nextAttemptAt: z.iso.datetime().nullable(),
});
export type TimeState = z.output<typeof timeState>;

export const signedHeadsApi = {
  ofStudy: endpoint({
    method: 'GET',
    path: '/organisations/:organisationId/studies/:id/signed-heads',
    summary: 'The keys, signatures and tokens of a study’s record, as a file to check',
    access: ['owner', 'manager', 'reviewer'],
    params: thingParams,
    reply: headProofs,
  }),
  time: endpoint({
    method: 'GET',
    path: '/organisations/:organisationId/timestamps',
    summary: 'Which authority stamps the time on signed heads, and how many wait for it',
    access: ['owner'],
    params: organisationParams,
    reply: timeState,
  }),
};
