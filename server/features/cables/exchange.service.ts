import Papa from 'papaparse';
import {
  type CableCsvFault,
  cableCsvExample,
  cableCsvHeadings,
  cellsOfCable,
  readCableLines,
} from '#shared/cables/cable-csv.ts';
import type { CableDraft } from '#shared/contracts/cables.ts';
import { Problem } from '#shared/problem.ts';
import { withTransaction } from '../../db/transaction.ts';
import type { Deps } from '../../deps.ts';
import { kindOfBytes, textOfBytes } from '../../files/kind-of-bytes.ts';
import type { Upload } from '../../files/receive-upload.ts';
import type { Caller } from '../../http/access.ts';
import * as store from './cables.store.ts';
import { cablesClosedTo } from './open-cable.service.ts';

/** UTF-8 with its mark, so that spreadsheets read accents right. */
const csvOf = (lines: readonly (readonly string[])[]) =>
  Buffer.from(`\ufeff${Papa.unparse(lines as string[][], { newline: '\r\n' })}\r\n`, 'utf8');

/** A table with the headings and one line to show how they are filled. */
export function cableTemplate() {
  return { name: 'cables-template.csv', bytes: csvOf([cableCsvHeadings, cellsOfCable(cableCsvExample)]) };
}

/** Every cable of the organisation that is not archived. */
export async function exportCables({ db }: Deps, who: Caller) {
  const cables = await withTransaction(db, async (tx) => {
    const closed = await cablesClosedTo(tx, who);
    return (await store.cablesToExport(tx, who.organisationId)).filter(({ id }) => !closed.has(id));
  });
  const lines = cables.map((cable) => cellsOfCable({ ...cable, construction: cable.construction ?? {} }));
  return { name: 'cables.csv', bytes: csvOf([cableCsvHeadings, ...lines]) };
}

const mostNamed = 50;

function linesOf({ bytes }: Upload): string[][] {
  const text = kindOfBytes(bytes) === 'text' ? textOfBytes(bytes) : null;
  if (text === null)
    throw new Problem('invalid-input', 'This file is no table; nothing was added.', [
      { pointer: '/file', detail: 'This is no text. Save the table as CSV and choose that file' },
    ]);
  return Papa.parse<string[]>(text.replace(/^\ufeff/, ''), { skipEmptyLines: false }).data;
}

/**
 * Adds the cables of a table, all of them or none.
 *
 * @param isTrial says what would be added, and adds nothing
 * @returns faults where there are any; then nothing was added
 */
export async function importCables(
  deps: Deps,
  { organisationId }: Caller,
  { isTrial, upload }: { isTrial: boolean; upload: Upload },
) {
  const { drafts, faults } = readCableLines(linesOf(upload));
  return withTransaction(deps.db, async (tx) => {
    const names = drafts.map(({ name }) => name);
    const known = await store.knownNames(tx, organisationId, names);
    if (!isTrial && faults.length === 0) {
      const now = new Date(deps.clock.now());
      const rows = drafts.map((draft: CableDraft) => ({ id: deps.random.id(), organisationId, draft, now }));
      await store.insertCables(tx, rows);
    }
    return {
      cables: drafts.length,
      isAdded: !isTrial && faults.length === 0,
      first: names.slice(0, 5),
      known: known.length,
      faults: faults.slice(0, mostNamed).map((fault: CableCsvFault) => ({ ...fault })),
      faultCount: faults.length,
    };
  });
}
