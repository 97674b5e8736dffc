import { z } from 'zod';
import { endpoint } from './endpoint.ts';
import { organisationParams } from './organisation-params.ts';
import { listQuery, pageOf } from './paging.ts';

// Files that leave the registry: each names what it is, so that none is taken for another.
export const registryLeafFormat = 'fairlead-registry-leaf/1';
export const registryHeadFormat = 'fairlead-registry-head/1';
export const inclusionFormat = 'fairlead-registry-inclusion/1';
export const consistencyFormat = 'fairlead-registry-consistency/1';

const hex = (bytes: number) => z.string().regex(new RegExp(`^[0-9a-f]{${bytes * 2}}$`));
const hashes = z.array(hex(32)).max(64);
const size = z.int().min(0);

/** One sealed version of a protocol, as it is entered. Nothing in it tells a cable, a title or a person. */
export const registryLeaf = z.strictObject({
  format: z.literal(registryLeafFormat),
  study: z.uuid(),
  /** The protocol's version, from 1. */
  version: z.int().min(1),
  /** The sealed protocol's digest. */
  digest: hex(32),
  sealedAt: z.iso.datetime(),
});
export type RegistryLeaf = z.output<typeof registryLeaf>;

/** The head of an organisation's log, signed when the last of its entries was made. */
export const registryHead = z.strictObject({
  format: z.literal(registryHeadFormat),
  organisation: z.uuid(),
  /** How many entries the log has. */
  size,
  root: hex(32),
  /** When it was signed, by the signer's clock. */
  at: z.iso.datetime(),
  /** Fingerprint of the key. */
  key: hex(32),
  /** Ed25519. Both stand outside what is signed. */
  publicKey: hex(32),
  signature: hex(64),
});
export type RegistryHead = z.output<typeof registryHead>;

/** That one entry is in the log of a signed head. */
export const inclusionFile = z.strictObject({
  format: z.literal(inclusionFormat),
  organisation: z.uuid(),
  leaf: registryLeaf,
  index: size,
  hashes,
  head: registryHead,
});
export type InclusionFile = z.output<typeof inclusionFile>;

/** That the log of one size begins with the log of a smaller one. */
export const consistencyFile = z.strictObject({
  format: z.literal(consistencyFormat),
  organisation: z.uuid(),
  first: size,
  second: size,
  hashes,
});
export type ConsistencyFile = z.output<typeof consistencyFile>;

/** What became of a sealed protocol, as far as anybody may know. */
export const registryStates = [
  'sealed',
  'amended',
  'collecting',
  'closed',
  'shelved',
  'published',
  'withdrawn',
] as const;
export type RegistryState = (typeof registryStates)[number];

export const registryRow = z.strictObject({
  index: size,
  version: z.int(),
  digest: z.string(),
  sealedAt: z.iso.datetime(),
  state: z.enum(registryStates),
  /** The neutral title; null until the study is closed. */
  title: z.string().nullable(),
  /** How many sessions the study has on its record; null until it is closed. */
  sessions: z.int().nullable(),
  /** The publication's id, where there is one. */
  publication: z.string().nullable(),
});
export type RegistryRow = z.output<typeof registryRow>;

export const registryListQuery = listQuery.extend({ state: z.enum(['any', ...registryStates]).default('any') });
export type RegistryListQuery = z.output<typeof registryListQuery>;

const registryKey = z.strictObject({
  fingerprint: z.string(),
  publicKey: z.string(),
  createdAt: z.iso.datetime(),
  retiredAt: z.iso.datetime().nullable(),
});

/** Where an organisation's registry stands, for good. */
export const registryPath = (organisationId: string) => `/registry/${organisationId}`;
/** Where its files are. */
export const registryHeadPath = (organisationId: string) => `/api${registryPath(organisationId)}/registry-head.json`;
export const inclusionPath = (organisationId: string, index: number) =>
  `/api${registryPath(organisationId)}/entries/${index}/inclusion.json`;

/** Each state as a sentence for anybody. */
export const registryStateWords: Record<RegistryState, string> = {
  sealed: 'Sealed',
  amended: 'Amended before data',
  collecting: 'Collecting',
  closed: 'Closed, no result published',
  shelved: 'Shelved, no result published',
  published: 'Published',
  withdrawn: 'Published and withdrawn',
};

/** What a registry is, and what it cannot show; said on every one. */
export const registryWords = {
  what: 'Every protocol that was sealed here, whatever became of it. Until a study is closed, this shows that it exists and nothing of what it is about.',
  kept: 'Keep the head. With it, anybody can show later that no entry has been taken out or altered since.',
  notShown:
    'A registry shows what was sealed here, not what was tried without sealing. Two visitors who were shown different registries find out by comparing their heads.',
} as const;

const base = '/registry/:organisationId';

export const registryApi = {
  list: endpoint({
    method: 'GET',
    path: base,
    summary: 'Every sealed protocol of an organisation, newest first, and the head of its log; for anybody',
    access: 'anyone',
    params: organisationParams,
    query: registryListQuery,
    reply: pageOf(registryRow).extend({ organisation: z.string(), head: registryHead.nullable() }),
  }),
  head: endpoint({
    method: 'GET',
    path: `${base}/registry-head.json`,
    summary: 'The signed head of an organisation’s log, to be kept',
    access: 'anyone',
    params: organisationParams,
    reply: registryHead,
  }),
  keys: endpoint({
    method: 'GET',
    path: `${base}/keys`,
    summary: 'The public keys by which an organisation has signed, newest first',
    access: 'anyone',
    params: organisationParams,
    reply: z.strictObject({ keys: z.array(registryKey) }),
  }),
  inclusion: endpoint({
    method: 'GET',
    path: `${base}/entries/:index/inclusion.json`,
    summary: 'The proof that an entry is in the log of the current head',
    access: 'anyone',
    params: organisationParams.extend({ index: z.coerce.number<string>().int().min(0).max(1_000_000) }),
    reply: inclusionFile,
  }),
  consistency: endpoint({
    method: 'GET',
    path: `${base}/consistency`,
    summary: 'The proof that the log has only grown from one size to another',
    access: 'anyone',
    params: organisationParams,
    query: z.strictObject({
      first: z.coerce.number<string>().int().min(1).max(1_000_000),
      second: z.coerce.number<string>().int().min(1).max(1_000_000),
    }),
    reply: consistencyFile,
  }),
};
