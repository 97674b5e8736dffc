import { z } from 'zod';
import { endpoint } from './endpoint.ts';
import { done, organisationParams } from './organisation-params.ts';
import { listQuery, pageOf } from './paging.ts';

/** A key by which an organisation signs its records: the public part alone. */
export const signingKey = z.strictObject({
  /** SHA-256 of the public key as a file (SubjectPublicKeyInfo in DER). */
  fingerprint: z.string(),
  /** Ed25519, 32 bytes in hexadecimal digits. */
  publicKey: z.string(),
  createdAt: z.iso.datetime(),
  /** Null where the first signature made it. */
  createdBy: z.string().nullable(),
  retiredAt: z.iso.datetime().nullable(),
  retiredReason: z.string().nullable(),
  /** How many heads it has signed. */
  heads: z.int(),
});
export type SigningKey = z.output<typeof signingKey>;

const base = '/organisations/:organisationId/signing-keys';

export const signingKeysApi = {
  list: endpoint({
    method: 'GET',
    path: base,
    summary:
      'The key that signs an organisation’s records, and the retired ones, newest first; searched by fingerprint',
    access: ['owner'],
    params: organisationParams,
    query: listQuery,
    reply: pageOf(signingKey).extend({ current: signingKey.nullable() }),
  }),
  rotate: endpoint({
    method: 'POST',
    path: `${base}/rotation`,
    summary: 'Retire the key that signs and make the next one; without a key, make the first',
    access: ['owner'],
    params: organisationParams,
    body: z.strictObject({
      /** The fingerprint of the key to retire, as it was seen; null where there was none. */
      retire: z.string().max(64, 'A fingerprint has 64 digits').nullable(),
      reason: z.string().trim().max(500, 'At most 500 characters'),
    }),
    reply: done,
  }),
};
