import { type Quantity, unitNamed } from './quantities.ts';
import { type LineFault, type ReadTable, readTable } from './read-table.ts';

/** Which columns of a table are which, from 0, and in which units. */
export interface ColumnChoice {
  /** Null for values that were not taken against frequency. */
  readonly frequency: number | null;
  readonly value: number;
  readonly frequencyUnit: string;
  readonly valueUnit: string;
}

/** One value; at a frequency in Hz where there is one, in the quantity's first unit. */
export interface Point {
  readonly frequency: number | null;
  readonly value: number;
}

export interface ReadMeasurement {
  readonly points: readonly Point[];
  readonly faults: readonly LineFault[];
}

export const mostPoints = 5000;

const largest: Record<Quantity, number> = {
  resistance: 1e9,
  impedance: 1e9,
  inductance: 1e3,
  capacitance: 1,
  level: 300,
};
const words: Record<Quantity | 'frequency', RegExp> = {
  frequency: /^(f|freq\w*|frequenz)\b/i,
  resistance: /^(r|rs|rdc|res\w*)\b/i,
  inductance: /^(l|ls|ind\w*)\b/i,
  capacitance: /^(c|cp|cs|cap\w*)\b/i,
  impedance: /^(\|?z\|?|imp\w*)/i,
  level: /^(lev\w*|db|gain|mag\w*|spl)\b/i,
};

/**
 * The columns that most likely hold a quantity, by the names and units of the heading, else by their order.
 *
 * @example chooseColumns(readTable('f/kHz;R/mΩ\n1;41,3'), 'resistance')
 * // { frequency: 0, value: 1, frequencyUnit: 'kHz', valueUnit: 'mΩ' }
 */
export function chooseColumns({ columns }: Pick<ReadTable, 'columns'>, quantity: Quantity): ColumnChoice {
  const find = (what: Quantity | 'frequency', others: readonly number[]) => {
    const free = columns.map((column, index) => ({ ...column, index })).filter(({ index }) => !others.includes(index));
    return (
      free.find(({ name, unit }) => words[what].test(name) && (unit === '' || unitNamed(what, unit) !== undefined)) ??
      free.find(({ name, unit }) => unitNamed(what, unit === '' ? name : unit) !== undefined)
    )?.index;
  };
  const stated = find('frequency', []);
  const frequency = stated ?? (columns.length > 1 ? 0 : null);
  const value = find(quantity, frequency === null ? [] : [frequency]) ?? (frequency === 0 ? 1 : 0);
  const unitAt = (what: Quantity | 'frequency', index: number | null) => {
    const column = index === null ? undefined : columns[index];
    return unitNamed(what, column?.unit || (column?.name ?? ''))?.name;
  };
  return {
    frequency,
    value,
    frequencyUnit: unitAt('frequency', frequency) ?? 'Hz',
    valueUnit: unitAt(quantity, value) ?? usualUnits[quantity],
  };
}

/** What is taken where a heading says nothing; shown beside the preview, to be changed. */
const usualUnits: Record<Quantity, string> = {
  resistance: 'Ω',
  inductance: 'µH',
  capacitance: 'pF',
  impedance: 'Ω',
  level: 'dB',
};

/**
 * The values of a quantity that a text holds, in order of frequency, and every line that cannot be read.
 *
 * @param choice columns of the table that the text holds, and units of the quantity
 * @returns points in Hz and in the quantity's first unit; they are only to be kept when there are no faults
 * @example readMeasurement('f/kHz;R/mΩ\n1;41,3', 'resistance', choice).points // [{ frequency: 1000, value: 0.0413 }]
 */
export function readMeasurement(text: string, quantity: Quantity, choice: ColumnChoice): ReadMeasurement {
  const table = readTable(text);
  const faults: LineFault[] = [...table.faults];
  const frequencyUnit = unitNamed('frequency', choice.frequencyUnit);
  const valueUnit = unitNamed(quantity, choice.valueUnit);
  if (table.rows.length === 0 && faults.length === 0)
    return { points: [], faults: [{ line: 1, detail: 'There is no line of numbers' }] };
  if (valueUnit === undefined || frequencyUnit === undefined)
    return { points: [], faults: [{ line: 1, detail: 'Choose the units' }] };
  const points: Point[] = [];
  for (const { line, values } of table.rows) {
    const value = scaled(values[choice.value], valueUnit.factor);
    const frequency = choice.frequency === null ? null : scaled(values[choice.frequency], frequencyUnit.factor);
    const fault = faultOf(quantity, value, frequency);
    if (fault === null) points.push({ frequency, value });
    else faults.push({ line, detail: fault });
  }
  if (points.length > mostPoints)
    faults.push({
      line: table.rows[mostPoints]?.line ?? 1,
      detail: `At most ${mostPoints.toLocaleString('en')} values: leave some out`,
    });
  faults.sort((one, other) => one.line - other.line);
  return { points: points.sort((one, other) => (one.frequency ?? 0) - (other.frequency ?? 0)), faults };
}

/** Without the digits that a multiplication in binary adds: 41.3 mΩ are 0.0413 Ω. */
const scaled = (value: number | undefined, factor: number): number =>
  value === undefined ? Number.NaN : Number((value * factor).toPrecision(12));

function faultOf(quantity: Quantity, value: number, frequency: number | null): string | null {
  if (Number.isNaN(value) || Number.isNaN(frequency)) return 'The chosen column has no value here';
  if (frequency !== null && !(frequency > 0 && frequency <= 1e9)) return 'A frequency is above 0 and at most 1 GHz';
  if (quantity === 'level') return Math.abs(value) <= largest.level ? null : 'A level lies between −300 and 300 dB';
  // Near nothing an instrument may read slightly below nothing.
  if (Math.abs(value) > largest[quantity]) return 'This is larger than any cable has: look at the unit';
  return null;
}
