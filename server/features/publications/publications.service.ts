import {
  confirmationIds,
  type OwnPublication,
  type PublicationDraft,
  type Publication as PublicationReply,
} from '#shared/contracts/publications.ts';
import type { Report } from '#shared/contracts/reports.ts';
import { fileDigest, utf8ToBytes } from '#shared/ledger/digest.ts';
import type { HeadProofs } from '#shared/ledger/head-proofs.ts';
import { publicationParts, publicationText, readPublication } from '#shared/ledger/publication-parts.ts';
import { StudyReading } from '#shared/ledger/study-reading.ts';
import { Problem } from '#shared/problem.ts';
import { type StudyPayloadOf, studyEvents } from '#shared/session/study-events.ts';
import { type Tx, withTransaction } from '../../db/transaction.ts';
import type { Deps, Random } from '../../deps.ts';
import { append, type NewEntry } from '../../ledger/ledger.ts';
import { organisationName } from '../organisations/organisations.store.ts';
import { closedRecord, reportOf } from '../reports/reports.service.ts';
import { headProofsOf, signedHeadsOf } from '../signed-heads/signed-heads.service.ts';
import { lockedStudy, studyOrProblem } from '../studies/studies.service.ts';
import { updateStudy } from '../studies/studies.store.ts';
import type { Study } from '../studies/study.entity.ts';
import type { Publication } from './publication.entity.ts';
import * as store from './publications.store.ts';
import { ownPublicationView, publicationRowView, publicationView } from './publications.views.ts';

type Where = { organisationId: string; id: string };

const entry = (kind: string, at: number, payload: NewEntry['payload']): NewEntry => ({
  kind,
  at,
  payload,
  session: null,
});

// Letters and digits that are not taken for one another; 32 of them, so that five bits choose one fairly.
const letters = '0123456789abcdefghjkmnpqrstvwxyz';

function shortId(random: Random): string {
  return [...random.bytes('publication-id', 8)].map((byte) => letters[byte % 32]).join('');
}

async function freeId(tx: Tx, random: Random): Promise<string> {
  for (;;) {
    const id = shortId(random);
    if ((await store.findPublication(tx, id)) === null) return id;
  }
}

function requireUnpublished(study: Study): void {
  if (study.state !== 'closed' && study.state !== 'shelved')
    throw new Problem(
      'wrong-phase',
      study.state === 'published' ? 'The study is published already.' : 'A study is published once it is closed.',
    );
}

/** What may not be published at all: an open study, and a record that does not hold. */
function requirePublishable(report: Report): void {
  if (report.rung.name === 'open')
    throw new Problem('not-allowed', `This study was not blind and cannot be published. ${report.rung.why}`);
  const failed = report.record.checks.find(({ outcome }) => outcome !== 'pass');
  if (failed !== undefined)
    throw new Problem(
      'not-allowed',
      `The record does not hold and cannot be published. ${failed.name}: ${failed.reason}`,
    );
}

/**
 * Publishes a closed study: the statements go on its record, the document is made of it and frozen, and the record
 * carries the document's digest from then on.
 */
export function publish(deps: Deps, where: Where, userId: string, draft: PublicationDraft): Promise<OwnPublication> {
  const { random, clock, config } = deps;
  return withTransaction(deps.db, async (tx) => {
    const study = await lockedStudy(tx, where);
    requireUnpublished(study);
    requirePublishable(reportOf(await closedRecord(tx, study)));
    const now = clock.now();
    const publisher = await organisationName(tx, where.organisationId);
    const { paid, supplied, ties } = draft;
    const declared: StudyPayloadOf<'publication-declared'> = {
      by: userId,
      publisher,
      paid,
      supplied,
      ties,
      confirmations: confirmationIds,
    };
    await append(tx, deps, study.id, [entry('publication-declared', now, declared)]);
    const closed = await closedRecord(tx, study);
    const document = publicationText(publicationParts(closed));
    const bytes = utf8ToBytes(document);
    const digest = fileDigest(bytes);
    const id = await freeId(tx, random);
    await append(tx, deps, study.id, [entry('study-published', now, { by: userId, id, digest })]);
    await updateStudy(tx, study.id, { state: 'published' }, new Date(now));
    const row: Publication = {
      id,
      studyId: study.id,
      organisationId: where.organisationId,
      title: study.title,
      headline: reportOf(closed).finding.headline,
      publisher,
      digest,
      document,
      bytes: bytes.length,
      publishedAt: new Date(now),
      withdrawnAt: null,
      withdrawnReason: null,
    };
    await store.insertPublication(tx, row);
    return ownPublicationView(row, config.publicUrl);
  });
}

/** Withdraws a publication. The page and its document stay; the record and the page say why. */
export function withdraw(deps: Deps, where: Where, userId: string, reason: string): Promise<OwnPublication> {
  const { clock, config } = deps;
  return withTransaction(deps.db, async (tx) => {
    const study = await lockedStudy(tx, where);
    const row = await store.publicationOfStudy(tx, study.id);
    if (row === null) throw new Problem('wrong-phase', 'The study is not published.');
    if (row.withdrawnAt !== null) throw new Problem('wrong-phase', 'The publication is withdrawn already.');
    const now = clock.now();
    await append(tx, deps, study.id, [entry('publication-withdrawn', now, { by: userId, id: row.id, reason })]);
    await store.withdrawPublication(tx, row.id, new Date(now), reason);
    await updateStudy(tx, study.id, {}, new Date(now));
    return ownPublicationView({ ...row, withdrawnAt: new Date(now), withdrawnReason: reason }, config.publicUrl);
  });
}

/** Shelves a closed study: no result is published, and the record says why. */
export function shelve(deps: Deps, where: Where, userId: string, reason: string): Promise<{ ok: true }> {
  return withTransaction(deps.db, async (tx) => {
    const study = await lockedStudy(tx, where);
    if (study.state !== 'closed')
      throw new Problem('wrong-phase', 'Only a study that is closed and not published can be shelved.');
    const now = deps.clock.now();
    await append(tx, deps, study.id, [entry('study-shelved', now, { by: userId, reason })]);
    await updateStudy(tx, study.id, { state: 'shelved' }, new Date(now));
    return { ok: true };
  });
}

export function publicationOf({ db, config }: Deps, where: Where): Promise<{ publication: OwnPublication | null }> {
  return withTransaction(db, async (tx) => {
    const study = await studyOrProblem(tx, where);
    const row = await store.publicationOfStudy(tx, study.id);
    return { publication: row === null ? null : ownPublicationView(row, config.publicUrl) };
  });
}

export function listPublications({ db }: Deps, query: { q: string; page: number; organisationId?: string }) {
  return withTransaction(db, async (tx) => {
    const found = await store.listPublications(tx, query);
    return { ...found, rows: found.rows.map(publicationRowView) };
  });
}

type Read = { report: Report; declared: StudyPayloadOf<'publication-declared'> };

// A frozen document always reads the same, so that its report is computed once and not for every visitor.
const mostKept = 40;
const kept = new Map<string, Read>();

function readDocument(digest: string, document: string): Read {
  const known = kept.get(digest);
  if (known !== undefined) return known;
  const read = readPublication(document);
  if ('fault' in read) throw new Error(`a frozen document cannot be read: ${read.fault}`);
  const study = new StudyReading(read.parts);
  const protocol = study.protocol();
  const made = {
    report: reportOf({
      study: { id: protocol.study, title: protocol.title },
      protocol,
      earlierProtocols: study.earlierProtocols(),
      entries: study.entries(),
      answers: study.answers(),
      requests: study.requests(),
      rooms: new Map(),
      // Not in the document: tokens may still arrive.
      heads: [],
    }),
    declared: studyEvents['publication-declared'].parse(study.payloadOf('publication-declared')),
  };
  if (kept.size >= mostKept) kept.delete(kept.keys().next().value ?? '');
  kept.set(digest, made);
  return made;
}

const nothingPublished = () => new Problem('not-found', 'Nothing is published at this address.');

/** A publication for anybody, computed from its frozen document. @throws Problem `not-found` */
export function getPublication({ db, config }: Deps, id: string): Promise<PublicationReply> {
  return withTransaction(db, async (tx) => {
    const row = await store.findPublication(tx, id);
    if (row === null) throw nothingPublished();
    const read = kept.get(row.digest) ?? readDocument(row.digest, (await store.documentOf(tx, id, row.digest)) ?? '');
    const heads = await signedHeadsOf(tx, row.studyId);
    return publicationView({ row, publicUrl: config.publicUrl, ...read, heads });
  });
}

/** Keys, signatures and tokens, for anybody. Not in the frozen document: the last ones come after it. @throws Problem `not-found` */
export function publishedHeadProofs({ db }: Deps, id: string): Promise<HeadProofs> {
  return withTransaction(db, async (tx) => {
    const row = await store.findPublication(tx, id);
    if (row === null) throw nothingPublished();
    return headProofsOf(tx, { id: row.studyId, organisationId: row.organisationId });
  });
}

/** The frozen document, byte for byte. @throws Problem `not-found`, also where the digest is another one */
export function getDocument({ db }: Deps, id: string, digest: string): Promise<string> {
  return withTransaction(db, async (tx) => {
    const document = await store.documentOf(tx, id, digest);
    if (document === null) throw nothingPublished();
    return document;
  });
}

/** Every public address with the day of its last change, for the sitemap. */
export function publicAddresses({ db }: Deps): Promise<{ id: string; changedAt: Date }[]> {
  return withTransaction(db, async (tx) => {
    const rows = await store.publicationAddresses(tx);
    return rows.map(({ id, publishedAt, withdrawnAt }) => ({ id, changedAt: withdrawnAt ?? publishedAt }));
  });
}
