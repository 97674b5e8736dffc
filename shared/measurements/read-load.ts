import type { ImpedanceAt } from '#shared/cables/load.ts';
import { unitNamed } from './quantities.ts';
import { chooseColumns, readMeasurement } from './read-measurement.ts';
import { type LineFault, readTable } from './read-table.ts';

export interface ReadLoad {
  readonly points: readonly ImpedanceAt[];
  readonly faults: readonly LineFault[];
  /** Without phases the load is taken as a resistance that changes with frequency. */
  readonly hasPhase: boolean;
}

const leastOhms = 0.1;

/**
 * The impedance curve of a load: frequency, magnitude and, where a column of degrees is there, phase.
 *
 * @example readLoad('f/Hz;Z/Ω;°\n20;6,2;12').points // [{ frequency: 20, ohms: 6.2, degrees: 12 }]
 */
export function readLoad(text: string): ReadLoad {
  const table = readTable(text);
  const columns = chooseColumns(table, 'impedance');
  const phase = table.columns.findIndex(
    ({ name, unit }, index) =>
      index !== columns.frequency &&
      index !== columns.value &&
      (/^(phase|phi|φ|arg\w*|deg\w*)/i.test(name) || unitNamed('phase', unit === '' ? name : unit) !== undefined),
  );
  const { points, faults } = readMeasurement(text, 'impedance', columns);
  const degrees = new Map(
    table.rows.map(({ values }) => [values[columns.frequency ?? 0], phase < 0 ? 0 : (values[phase] ?? 0)]),
  );
  const factor = unitNamed('frequency', columns.frequencyUnit)?.factor ?? 1;
  const wrong = points.some(({ frequency, value }) => frequency === null || value < leastOhms)
    ? [{ line: 1, detail: `Each line needs a frequency and an impedance of at least ${leastOhms} Ω` }]
    : [];
  return {
    hasPhase: phase >= 0,
    faults: [...faults, ...wrong],
    points: points.flatMap(({ frequency, value }) =>
      frequency === null
        ? []
        : [{ frequency, ohms: value, degrees: degrees.get(Number((frequency / factor).toPrecision(12))) ?? 0 }],
    ),
  };
}
