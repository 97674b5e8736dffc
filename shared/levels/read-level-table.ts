import Papa from 'papaparse';
import type { LevelUnit } from './level-units.ts';
import { hertzText } from './level-words.ts';
import { type LevelChannel, repeats } from './measured-levels.ts';
import { readReading } from './read-reading.ts';
import { gainHz } from './registered-levels.ts';

/** A line that was understood, its readings still as they were written. */
export type TableLine = {
  readonly code: string;
  readonly channel: LevelChannel;
  readonly frequencyHz: number;
  readonly readings: readonly string[];
};

/** A line that was not: its number, what is wrong, and the line itself, so that nothing is lost. */
export type TableFault = { readonly line: number; readonly text: string; readonly content: string };

export type ReadTable = { readonly lines: readonly TableLine[]; readonly faults: readonly TableFault[] };

const channelNames: Record<string, LevelChannel> = {
  left: 'left',
  l: 'left',
  right: 'right',
  r: 'right',
  mono: 'mono',
  m: 'mono',
};

type Column = 'code' | 'channel' | 'frequency' | 'reading';

function columnOf(header: string): Column | null {
  const words = header.toLowerCase();
  if (/code|specimen|sleeve/.test(words)) return 'code';
  if (/chan|side/.test(words)) return 'channel';
  if (/freq|\bhz\b|hertz/.test(words)) return 'frequency';
  if (/read|level|value|volt|^[123]$|\bv\b|db/.test(words)) return 'reading';
  return null;
}

/** Reads "1 kHz", "3,15k", "1000", "315 Hz"; null where it is no frequency. */
export function readHertz(text: string): number | null {
  const parts = /^(\d+(?:[.,]\d+)?)\s*(k?)(?:hz)?$/i.exec(text.trim());
  if (parts === null) return null;
  return Math.round(Number((parts[1] ?? '').replace(',', '.')) * (parts[2] === '' ? 1 : 1000));
}

/** Spreadsheets paste tabs; files with decimal commas part their columns by semicolons. */
const delimiterOf = (text: string) => (text.includes('\t') ? '\t' : text.includes(';') ? ';' : ',');

const usualOrder = (width: number): Column[] => [
  'code',
  'channel',
  ...(width > repeats + 2 ? (['frequency'] as const) : []),
  ...Array.from({ length: repeats }, () => 'reading' as const),
];

/** The columns that a first line names, or null when it is no header: a header has words where readings are due. */
function headerOf(cells: readonly string[]): (Column | null)[] | null {
  const columns = cells.map(columnOf);
  const named = columns.filter((column) => column !== null).length;
  return named >= 3 && columns.includes('code') && !/^\d{3}$/.test(cells[columns.indexOf('code')] ?? '')
    ? columns
    : null;
}

function readLine(cells: readonly string[], columns: readonly (Column | null)[], unit: LevelUnit): TableLine | string {
  if (cells.slice(columns.length).some((cell) => cell.trim() !== ''))
    return 'It has more columns than the others. Where decimals have commas, part the columns by tabs or semicolons.';
  const at = (column: Column) => cells[columns.indexOf(column)]?.trim() ?? '';
  const code = at('code').replace(/^FL:/i, '');
  if (!/^\d{1,3}$/.test(code)) return `“${at('code')}” is no blind code of three digits.`;
  const channel = channelNames[at('channel').toLowerCase()];
  if (channel === undefined)
    return at('channel') === ''
      ? 'The channel is missing: left, right or mono.'
      : `“${at('channel')}” is no channel. Write left, right or mono.`;
  const written = columns.includes('frequency') ? at('frequency') : hertzText(gainHz);
  const frequencyHz = readHertz(written);
  if (frequencyHz === null) return `“${written}” is no frequency. Write hertz, as in 1000 or 1 kHz.`;
  const readings = columns.flatMap((column, index) => (column === 'reading' ? [cells[index]?.trim() ?? ''] : []));
  const given = readings.filter((reading) => reading !== '');
  if (given.length !== repeats)
    return `${given.length} readings where ${repeats} are due. Read each level ${repeats} times.`;
  for (const reading of given) {
    const read = readReading(reading, unit);
    if ('fault' in read) return read.fault;
  }
  return { code: code.padStart(3, '0'), channel, frequencyHz, readings: given };
}

/**
 * Reads a table of levels as people have them: pasted from a spreadsheet, or a file of comma-separated values. Columns may
 * come in any order under a header, else code, channel, perhaps frequency, and three readings; decimal commas are read.
 *
 * @returns the lines that were understood, and for every other its number, what is wrong, and the line itself
 */
export function readLevelTable(text: string, unit: LevelUnit): ReadTable {
  const clean = text.replace(/^\uFEFF/, '');
  const delimiter = delimiterOf(clean);
  const rows = Papa.parse<string[]>(clean, { delimiter, skipEmptyLines: false }).data;
  const lines: TableLine[] = [];
  const faults: TableFault[] = [];
  let columns: (Column | null)[] | null = null;
  for (const [index, cells] of rows.entries()) {
    if (cells.every((cell) => cell.trim() === '')) continue;
    if (columns === null) {
      columns = headerOf(cells);
      if (columns !== null) continue;
      columns = usualOrder(cells.length);
    }
    const read = readLine(cells, columns, unit);
    if (typeof read === 'string')
      faults.push({ line: index + 1, text: read, content: Papa.unparse([cells], { delimiter }) });
    else lines.push(read);
  }
  return { lines, faults };
}
