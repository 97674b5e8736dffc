/** A fault in a text, at its line, from 1. */
export interface LineFault {
  readonly line: number;
  readonly detail: string;
}

/** A column as its heading names it; empty where there is no heading. */
export interface TableColumn {
  readonly name: string;
  readonly unit: string;
}

export interface TableRow {
  readonly line: number;
  readonly values: readonly number[];
}

/** The table that a text was found to hold. */
export interface ReadTable {
  readonly separator: 'tab' | 'semicolon' | 'comma' | 'space';
  readonly decimal: '.' | ',';
  readonly columns: readonly TableColumn[];
  readonly rows: readonly TableRow[];
  /** Lines among the values that hold none, or not as many as the others. */
  readonly faults: readonly LineFault[];
}

type Manner = Pick<ReadTable, 'separator' | 'decimal'>;
type Line = { readonly line: number; readonly text: string };

/** In the order of preference where a text can be read in several ways. */
const manners: readonly Manner[] = [
  { separator: 'tab', decimal: '.' },
  { separator: 'tab', decimal: ',' },
  { separator: 'semicolon', decimal: '.' },
  { separator: 'semicolon', decimal: ',' },
  { separator: 'comma', decimal: '.' },
  { separator: 'space', decimal: '.' },
  { separator: 'space', decimal: ',' },
];

const separators = { tab: '\t', semicolon: ';', comma: ',', space: /\s+/ } as const;
/** More of a heading says nothing about its column. */
const longestHeading = 120;
const comment = /^(#|%|!|\*|\/\/|"#)/;

/**
 * Reads a table of numbers as instruments, spreadsheets and people write it: with tabs, semicolons, commas or blanks between
 * the columns, a decimal point or comma, comment lines (#, %, !, *, //), a heading with units, a byte order mark.
 *
 * The way that makes the most lines whole rows of numbers is taken; a separator of thousands is never guessed at.
 *
 * @example readTable('f/kHz;R/mΩ\n1;41,3').rows[0]?.values // [1, 41.3]
 */
export function readTable(text: string): ReadTable {
  const lines = linesOf(text);
  const possible = isCommaBetween(lines) ? manners : manners.filter(({ separator }) => separator !== 'comma');
  const best = possible
    .map((manner) => ({ manner, score: scoreOf(lines, manner) }))
    .reduce((one, other) => (other.score > one.score ? other : one));
  return readIn(lines, best.manner);
}

/**
 * Whether commas stand between columns. "41,3" alone, or below a heading without a comma, is one number; with points about
 * ("20,0.1"), or line below line, there are two.
 */
function isCommaBetween(lines: readonly Line[]): boolean {
  if (lines.some(({ text }) => /\d\.\d/.test(text) && text.includes(','))) return true;
  const heading = lines.findLast(({ text }) => /^"?[^\d\s".,+−-]/.test(text));
  return heading === undefined ? lines.length > 1 : heading.text.includes(',');
}

function linesOf(text: string): Line[] {
  return text
    .replace(/^\ufeff/, '')
    .split(/\r\n|\r|\n/)
    .map((each, index) => ({ line: index + 1, text: each.trim() }))
    .filter(({ text: each }) => each !== '' && !comment.test(each));
}

function cellsOf({ text }: Line, { separator }: Manner): string[] {
  const cells = text.split(separators[separator]).map((cell) =>
    cell
      .trim()
      .replace(/^"(.*)"$/, '$1')
      .trim(),
  );
  // Spreadsheets end each line with the separator.
  while (cells.length > 1 && cells.at(-1) === '') cells.pop();
  return cells;
}

const patterns = { '.': /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i, ',': /^[+-]?(\d+,?\d*|,\d+)(e[+-]?\d+)?$/i };

/** @returns NaN for what is no number; a minus sign may be the typographer's */
function numberOf(cell: string, decimal: Manner['decimal']): number {
  const written = cell.replace(/[−–]/g, '-');
  return patterns[decimal].test(written) ? Number(written.replace(',', '.')) : Number.NaN;
}

/** How many cells stand in lines that are all numbers; a line of two columns says more than one of one. */
function scoreOf(lines: readonly Line[], manner: Manner): number {
  let score = 0;
  for (const line of lines) {
    const cells = cellsOf(line, manner);
    if (cells.every((cell) => !Number.isNaN(numberOf(cell, manner.decimal)))) score += cells.length > 1 ? 2 : 1;
  }
  return score;
}

function readIn(lines: readonly Line[], manner: Manner): ReadTable {
  const made = lines.map((line) => {
    const cells = cellsOf(line, manner);
    return { line: line.line, cells, values: cells.map((cell) => numberOf(cell, manner.decimal)) };
  });
  const isRow = ({ values }: (typeof made)[number]) => values.every((value) => !Number.isNaN(value));
  const firstRow = made.findIndex(isRow);
  const width = usual(made.filter(isRow).map(({ values }) => values.length));
  const begins = firstRow < 0 ? made.length : beginOfValues(made, firstRow);
  const rows: TableRow[] = [];
  const faults: LineFault[] = [];
  for (const { line, cells, values } of made.slice(begins)) {
    const wrong = cells.find((_, index) => Number.isNaN(values[index]));
    if (wrong !== undefined) faults.push({ line, detail: faultOf(wrong) });
    else if (values.length < width)
      faults.push({
        line,
        detail: `${width} values are needed here, and there ${values.length === 1 ? 'is 1' : `are ${values.length}`}`,
      });
    else rows.push({ line, values });
  }
  const heading = made.slice(0, begins).findLast(({ cells }) => cells.length === width)?.cells ?? [];
  const columns = Array.from({ length: width }, (_, index) => columnOf(heading[index] ?? ''));
  return { ...manner, columns, rows, faults };
}

/** A broken line just above the first whole one belongs to the values when it begins with a number. */
function beginOfValues(made: readonly { values: readonly number[] }[], firstRow: number): number {
  let begins = firstRow;
  while (begins > 0 && !Number.isNaN(made[begins - 1]?.values[0] ?? Number.NaN)) begins -= 1;
  return begins;
}

function usual(widths: readonly number[]): number {
  const counts = new Map<number, number>();
  for (const width of widths) counts.set(width, (counts.get(width) ?? 0) + 1);
  return [...counts].reduce((most, each) => (each[1] > most[1] ? each : most), [0, 0])[0];
}

function faultOf(cell: string): string {
  if (cell === '') return 'A value is missing';
  const isGrouped = /^\d{1,3}([.,'\s]\d{3})+([.,]\d+)?$/.test(cell);
  const shown = cell.length > 30 ? `${cell.slice(0, 30)}…` : cell;
  return isGrouped ? `“${shown}” is not clear: write it without separators of thousands` : `“${shown}” is not a number`;
}

/** "R [mΩ]", "R (mΩ)", "R / mΩ", "R in mΩ", "mΩ": what a heading calls its column, and the unit. */
function columnOf(cell: string): TableColumn {
  const heading = cell.slice(0, longestHeading);
  const [, name, bracketed, after] =
    /^(.*?)\s*(?:[[(]([^\])]*)[\])]|(?:\/|,|\bin\b)\s*([^\s/]+))\s*$/.exec(heading) ?? [];
  return { name: (name ?? heading).trim(), unit: (bracketed ?? after ?? '').trim() };
}
