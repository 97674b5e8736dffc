import { z } from 'zod';
import { headProofs } from '../ledger/head-proofs.ts';
import { endpoint, managers } from './endpoint.ts';
import { done, thingParams } from './organisation-params.ts';
import { listQuery, pageOf } from './paging.ts';
import { report } from './reports.ts';

const words = (most: number, missing: string) =>
  z
    .string()
    .trim()
    .min(3, missing)
    .max(most, `At most ${most.toLocaleString('en')} characters`);

/**
 * What a publisher confirms, one by one; shown on the page. Common practice, no source, but for ties (16 CFR 255) and
 * evidence before the claim (FTC substantiation policy; CAP Code).
 */
export const confirmations = {
  complete: 'Every session that was held for this question is in this record; none was left out.',
  deviations: 'Whatever differed from the protocol is recorded as a deviation, with its reason.',
  specimens: 'The specimens were as sold, or the statement of who supplied them says what was done to them.',
  privacy: 'No note, reason or deviation that becomes public lets a person be recognised.',
  claims: 'Nobody here will claim more than the page allows, nor leave out who paid and how level was handled.',
  evidence: 'Specimens and evidence are kept for as long as a claim is made and six years after it.',
  permanent: 'The page stays for good. It can be withdrawn with a reason, and not removed.',
} as const;
export const confirmationIds = Object.keys(confirmations) as (keyof typeof confirmations)[];

/** What no record can show; said on every publication and every report. */
export const notShown =
  'No software shows what was physically plugged in, that nobody told, or that whoever runs the server did not read the secrets early.';

const confirmed = z.literal(true, 'Confirm this, or do not publish yet');

/** What a manager states when publishing; all of it is public. */
export const publicationStatements = z.strictObject({
  paid: words(400, 'Say who paid for the study'),
  supplied: words(600, 'Say who supplied the specimens, and how they were chosen'),
  ties: words(600, 'Say what ties there are; type “none” if there are none'),
});

export const publicationDraft = publicationStatements.extend({
  confirmations: z.strictObject({
    complete: confirmed,
    deviations: confirmed,
    specimens: confirmed,
    privacy: confirmed,
    claims: confirmed,
    evidence: confirmed,
    permanent: confirmed,
  }),
});
export type PublicationDraft = z.output<typeof publicationDraft>;

const withdrawal = z.strictObject({ at: z.iso.datetime(), reason: z.string() });

const shortId = z.string().regex(/^[0-9a-hjkmnp-tv-z]{8}$/);

const rowShape = {
  id: shortId,
  headline: z.string(),
  title: z.string(),
  publisher: z.string(),
  publishedAt: z.iso.datetime(),
};
export const publicationRow = z.strictObject({ ...rowShape, isWithdrawn: z.boolean() });
export type PublicationRow = z.output<typeof publicationRow>;

/** A publication as anybody sees it. Everything but the withdrawal is computed from the frozen document. */
export const publication = z.strictObject({
  ...rowShape,
  /** Its stable public address. */
  address: z.url(),
  description: z.string(),
  withdrawn: withdrawal.nullable(),
  statements: publicationStatements,
  confirmations: z.array(z.string()),
  /** What belongs to the finding's first lines beside its own: the gap between presentations and how blind it was. */
  /** The frozen document: its SHA-256 digest, its size in bytes, and where it is. */
  file: z.strictObject({ digest: z.string(), bytes: z.int(), path: z.string() }),
  /** Where the publisher's registry of sealed protocols stands. */
  registry: z.string(),
  /** Where the bundle is: the document with tables, signatures, tokens and what recomputes its figures. */
  bundle: z.string(),
  report,
});
export type Publication = z.output<typeof publication>;

/** What its organisation sees of a publication. */
export const ownPublication = z.strictObject({
  id: shortId,
  address: z.url(),
  publishedAt: z.iso.datetime(),
  digest: z.string(),
  withdrawn: withdrawal.nullable(),
});
export type OwnPublication = z.output<typeof ownPublication>;

const reasonBody = (missing: string) => z.strictObject({ reason: words(500, missing) });
const ofStudy = '/organisations/:organisationId/studies/:id';

export const publicationsApi = {
  list: endpoint({
    method: 'GET',
    path: '/publications',
    summary: 'Published studies, newest first; of one organisation, where its id is given',
    access: 'anyone',
    query: listQuery.extend({ organisationId: z.uuid().optional() }),
    reply: pageOf(publicationRow),
  }),
  get: endpoint({
    method: 'GET',
    path: '/publications/:id',
    summary: 'A publication, for anybody',
    access: 'anyone',
    params: z.strictObject({ id: shortId }),
    reply: publication,
  }),
  signedHeads: endpoint({
    method: 'GET',
    path: '/publications/:id/signed-heads',
    summary: 'The keys, signatures and tokens of a published record, for anybody, as a file to check',
    access: 'anyone',
    params: z.strictObject({ id: shortId }),
    reply: headProofs,
  }),
  ofStudy: endpoint({
    method: 'GET',
    path: `${ofStudy}/publication`,
    summary: 'Whether and where a study is published',
    access: ['owner', 'manager', 'reviewer'],
    params: thingParams,
    reply: z.strictObject({ publication: ownPublication.nullable() }),
  }),
  publish: endpoint({
    method: 'POST',
    path: `${ofStudy}/publication`,
    summary: 'Publish a closed study, for good',
    access: managers,
    params: thingParams,
    body: publicationDraft,
    reply: ownPublication,
  }),
  withdraw: endpoint({
    method: 'POST',
    path: `${ofStudy}/publication/withdrawal`,
    summary: 'Withdraw a publication, with a reason; its page stays and says so',
    access: managers,
    params: thingParams,
    body: reasonBody('Say why it is withdrawn'),
    reply: ownPublication,
  }),
  shelve: endpoint({
    method: 'POST',
    path: `${ofStudy}/shelving`,
    summary: 'Shelve a closed study without publishing its result',
    access: managers,
    params: thingParams,
    body: reasonBody('Say why no result is published'),
    reply: done,
  }),
};
