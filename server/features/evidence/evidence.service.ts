import sharp from 'sharp';
import type { Evidence as EvidenceReply } from '#shared/contracts/evidence.ts';
import { Problem } from '#shared/problem.ts';
import { withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { kindOfBytes } from '../../files/kind-of-bytes.ts';
import type { Upload } from '../../files/receive-upload.ts';
import type { Caller } from '../../http/access.ts';
import { openCable } from '../cables/open-cable.service.ts';
import { Evidence } from './evidence.entity.ts';

const mostOfCable = 50;
const mostPixels = 60_000_000;

const view = ({ id, rule, note, fileName, fileDigest, addedAt }: Evidence): EvidenceReply => ({
  id,
  rule,
  note,
  file: { name: fileName, digest: fileDigest },
  addedAt: addedAt.toISOString(),
});

export function listEvidence({ db }: Deps, who: Caller, cableId: string) {
  return withTransaction(db, async (tx) => {
    await openCable(tx, who, cableId);
    return { evidence: (await tx.find(Evidence, { where: { cableId }, order: { addedAt: 'ASC' } })).map(view) };
  });
}

const unfit = (detail: string) =>
  new Problem('invalid-input', 'This file cannot be evidence; nothing was kept.', [{ pointer: '/file', detail }]);

/** A picture drawn anew without what its camera wrote into it, place and owner included; other files as they came. */
async function fitFile({ bytes }: Upload): Promise<Buffer> {
  const kind = kindOfBytes(bytes);
  if (kind === 'unknown') throw unfit('Send text, PDF, PNG, JPEG or WebP');
  if (kind === 'text' || kind === 'pdf') return bytes;
  try {
    return await sharp(bytes, { limitInputPixels: mostPixels }).rotate().toFormat(kind).toBuffer();
  } catch {
    throw unfit('This picture cannot be read; save it anew and send that');
  }
}

export async function addEvidence(
  deps: Deps,
  who: Caller,
  cableId: string,
  answer: { rule: string; note: string; upload: Upload },
): Promise<EvidenceReply> {
  const fit = await fitFile(answer.upload);
  return withTransaction(deps.db, async (tx) => {
    await openCable(tx, who, cableId);
    if ((await tx.countBy(Evidence, { cableId })) >= mostOfCable)
      throw new Problem('too-large', `A cable takes at most ${mostOfCable} files of evidence.`);
    const row: Evidence = {
      id: deps.random.id(),
      cableId,
      rule: answer.rule,
      note: answer.note,
      fileDigest: await deps.files.put(fit),
      fileName: answer.upload.name,
      addedBy: who.userId,
      addedAt: new Date(deps.clock.now()),
    };
    await tx.insert(Evidence, row);
    return view(row);
  });
}

export async function evidenceFile(deps: Deps, who: Caller, { id, evidenceId }: { id: string; evidenceId: string }) {
  const row = await withTransaction(deps.db, async (tx) => {
    await openCable(tx, who, id);
    return tx.findOneBy(Evidence, { id: evidenceId, cableId: id });
  });
  const bytes = row === null ? null : await deps.files.get(row.fileDigest);
  if (row === null || bytes === null) throw new Problem('not-found', 'There is no such file.');
  return { name: row.fileName, bytes };
}
