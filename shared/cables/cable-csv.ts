import { type CableDraft, cableDraft, cableKinds } from '../contracts/cables.ts';
import { type Construction, construction } from '../contracts/construction.ts';

// Cables as the lines of a table, to be written and read by a spreadsheet.

const constructionFields = Object.keys(construction.shape) as (keyof Construction)[];
const words: readonly (keyof Construction)[] = [
  'material',
  'nines',
  'build',
  'insulation',
  'geometry',
  'shield',
  'connectors',
  'treatments',
];

/** The headings of the table, in order. Construction fields bear the names of the API, with their units in them. */
export const cableCsvHeadings: readonly string[] = ['name', 'kind', 'lengthM', 'description', ...constructionFields];

/** What an example of a line looks like in the template. */
export const cableCsvExample: CableDraft = {
  name: 'Example run',
  kind: 'loudspeaker',
  lengthMm: 3000,
  description: 'Delete this line',
  construction: { material: 'copper-etp', areaMm2: 2.5, geometry: 'parallel', spacingMm: 5, permittivity: 2.3 },
};

/** At most so many cables come in at once. */
export const mostImported = 5000;

/**
 * A cell that a spreadsheet would take for a formula, marked as text by an apostrophe.
 *
 * @see OWASP, CSV Injection
 * @example plainCell('=1+1') // "'=1+1"
 */
export function plainCell(text: string): string {
  return /^['=+\-@\t\r]/.test(text) ? `'${text}` : text;
}

/** The text of a cell that `plainCell` has marked. */
const textOfCell = (cell: string): string => (/^'['=+\-@\t\r]/.test(cell) ? cell.slice(1) : cell).trim();

/** One cable as cells, in the order of the headings. */
export function cellsOfCable({ name, kind, lengthMm, description, construction: made = {} }: CableDraft): string[] {
  const values = [name, kind, String(lengthMm / 1000), description, ...constructionFields.map((field) => made[field])];
  return values.map((value) => plainCell(value === undefined ? '' : String(value)));
}

/** A fault of a table of cables: its line, from 1, the heading of the column, and what is wrong. */
export interface CableCsvFault {
  readonly line: number;
  readonly column: string;
  readonly detail: string;
}

export interface ReadCables {
  readonly drafts: readonly CableDraft[];
  readonly faults: readonly CableCsvFault[];
}

/**
 * The cables of a table whose first line is the headings, in any order; columns may be left out but for name, kind and length.
 *
 * Numbers may bear a decimal comma. Every fault is named with its line and column; nothing is guessed.
 *
 * @param lines cells, line by line, the headings first
 */
export function readCableLines(lines: readonly (readonly string[])[]): ReadCables {
  const [head, ...body] = lines;
  const headings = (head ?? []).map((cell) => cell.trim().replace(/^\ufeff/, ''));
  const missing = ['name', 'kind', 'lengthM'].filter((name) => !headings.includes(name));
  const unknown = headings.filter((name) => name !== '' && !cableCsvHeadings.includes(name));
  const doubled = headings.filter((name, index) => name !== '' && headings.indexOf(name) !== index);
  const faults: CableCsvFault[] = [
    ...missing.map((column) => ({ line: 1, column, detail: 'This column is missing' })),
    ...unknown.map((column) => ({ line: 1, column: column.slice(0, 60), detail: 'This is no column of a cable' })),
    ...doubled.map((column) => ({ line: 1, column, detail: 'This column stands there twice' })),
  ];
  if (faults.length > 0) return { drafts: [], faults };
  const drafts: CableDraft[] = [];
  for (const [index, cells] of body.entries()) {
    if (cells.every((cell) => cell.trim() === '')) continue;
    const line = index + 2;
    if (drafts.length >= mostImported) {
      faults.push({ line, column: 'name', detail: `At most ${mostImported.toLocaleString('en')} cables at once` });
      break;
    }
    const read = cableDraft.safeParse(draftOf(headings, cells));
    if (read.success) drafts.push(read.data);
    else
      for (const { path, message } of read.error.issues) faults.push({ line, column: columnOf(path), detail: message });
  }
  if (drafts.length === 0 && faults.length === 0)
    faults.push({ line: 2, column: 'name', detail: 'There is no cable below the headings' });
  return { drafts, faults };
}

const columnOf = (path: readonly PropertyKey[]): string => {
  const field = String(path.at(-1));
  return field === 'lengthMm' ? 'lengthM' : field;
};

const numberOf = (text: string) => (/^[+-]?\d*[.,]?\d+$/.test(text) ? Number(text.replace(',', '.')) : Number.NaN);

function draftOf(headings: readonly string[], cells: readonly string[]): Record<string, unknown> {
  const at = (name: string) => textOfCell(cells[headings.indexOf(name)] ?? '');
  const made: Record<string, unknown> = {};
  for (const field of constructionFields) {
    const text = at(field);
    if (text !== '') made[field] = words.includes(field) ? text : numberOf(text);
  }
  const kind = at('kind');
  return {
    name: at('name'),
    kind: cableKinds.find((known) => known === kind.toLowerCase()) ?? kind,
    lengthMm: Math.round(numberOf(at('lengthM')) * 1000),
    description: at('description'),
    ...(Object.keys(made).length === 0 ? {} : { construction: made }),
  };
}
