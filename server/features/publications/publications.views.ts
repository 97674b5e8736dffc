import {
  confirmations,
  type OwnPublication,
  type Publication as PublicationReply,
  type PublicationRow,
} from '#shared/contracts/publications.ts';
import { registryPath } from '#shared/contracts/registry.ts';
import type { Report } from '#shared/contracts/reports.ts';
import type { SignedHead } from '#shared/contracts/signed-heads.ts';
import { equationOfP } from '#shared/findings/format-probability.ts';
import { methodOf } from '#shared/methods/methods.ts';
import type { StudyPayloadOf } from '#shared/session/study-events.ts';
import type { Publication } from './publication.entity.ts';

/** Where a publication stands, for good. */
export const publicPath = (id: string) => `/p/${id}`;
/** Where its frozen document is: the address names the digest, so that what stands there can never change. */
export const filePath = (id: string, digest: string) => `${publicPath(id)}/${digest}.json`;

/** Where its bundle is made on demand: it grows by tokens that arrive later. */
export const bundlePath = (id: string) => `${publicPath(id)}/bundle.zip`;

const withdrawalOf = ({ withdrawnAt, withdrawnReason }: Publication) =>
  withdrawnAt === null ? null : { at: withdrawnAt.toISOString(), reason: withdrawnReason ?? '' };

export function publicationRowView(row: Publication): PublicationRow {
  const { id, headline, title, publisher, publishedAt } = row;
  return {
    id,
    headline,
    title,
    publisher,
    publishedAt: publishedAt.toISOString(),
    isWithdrawn: row.withdrawnAt !== null,
  };
}

export function ownPublicationView(row: Publication, publicUrl: string): OwnPublication {
  const { id, publishedAt, digest } = row;
  const address = publicUrl + publicPath(id);
  return { id, address, publishedAt: publishedAt.toISOString(), digest, withdrawn: withdrawalOf(row) };
}

function descriptionOf({ result, rung, cables }: Report, publisher: string): string {
  const { listeners, trials, p, alpha } = result;
  const [lead] = methodOf(result.method).portray(result, cables).figures;
  const count = `${lead?.value} ${lead?.label} in ${trials} trials, ${listeners} listener${listeners === 1 ? '' : 's'}, ${equationOfP(Number(p.value), Number(alpha))}`;
  return `${cables[0]} and ${cables[1]}, compared blind (${rung.name}): ${count}. Published by ${publisher}, with everything needed to check it.`;
}

export type PublicationSource = {
  readonly row: Publication;
  readonly publicUrl: string;
  readonly report: Report;
  readonly declared: StudyPayloadOf<'publication-declared'>;
  readonly heads: readonly SignedHead[];
};

/** A publication, field by field. */
export function publicationView({ row, publicUrl, report, declared, heads }: PublicationSource): PublicationReply {
  const { id, title, publisher, publishedAt, digest, bytes } = row;
  const { paid, supplied, ties } = declared;
  return {
    id,
    headline: report.finding.headline,
    title,
    publisher,
    publishedAt: publishedAt.toISOString(),
    address: publicUrl + publicPath(id),
    description: descriptionOf(report, publisher),
    withdrawn: withdrawalOf(row),
    statements: { paid, supplied, ties },
    confirmations: declared.confirmations.map((name) => confirmations[name]),
    file: { digest, bytes, path: filePath(id, digest) },
    registry: registryPath(row.organisationId),
    bundle: bundlePath(id),
    report: { ...report, record: { ...report.record, heads: [...heads] } },
  };
}
