import { predictedLine } from '#shared/cables/predicted-line.ts';
import type { CableDraft } from '#shared/contracts/cables.ts';
import type { MeasurementDraft } from '#shared/contracts/measurements.ts';

const frequencies = [0.1, 0.2, 0.5, 1, 2, 5, 10, 20, 50, 100];

const table = (heading: string, rows: readonly (readonly number[])[]) =>
  [heading, ...rows.map((row) => row.map((value) => String(Number(value.toPrecision(4)))).join(';'))]
    .join('\n')
    .replaceAll('.', ',');

/**
 * What the demo's workshop measured of one piece: near what the construction lets expect, a little above it, as contacts and
 * tolerances make it.
 *
 * @param above the share by which this piece lies above its construction
 */
export function demoMeasurements({ construction = {}, lengthMm }: CableDraft, above: number): MeasurementDraft[] {
  const line = predictedLine(construction, lengthMm);
  if (!line.isKnown) return [];
  const { constantsAt, length } = line.value;
  const made = {
    instrument: 'Workshop LCR bridge, four wires, far end shorted',
    person: 'Workshop of Skerry Line Works',
    takenOn: '2026-11-02',
    temperatureC: 21,
    moment: 'as-is' as const,
    note: '',
  };
  const sweep = (quantity: 'resistance' | 'inductance', heading: string, valueUnit: string, factor: number) => ({
    ...made,
    quantity,
    text: table(
      heading,
      frequencies.map((kiloHertz) => {
        const value = constantsAt(kiloHertz * 1000)[quantity] * length * (1 + above);
        return [kiloHertz, value * factor];
      }),
    ),
    columns: { frequency: 0, value: 1, frequencyUnit: 'kHz', valueUnit },
  });
  return [
    sweep('resistance', 'f/kHz;R/mΩ', 'mΩ', 1e3),
    sweep('inductance', 'f/kHz;L/µH', 'µH', 1e6),
    {
      ...made,
      instrument: 'Workshop LCR bridge at 1 kHz, far end open',
      quantity: 'capacitance',
      text: `${table('C/pF', [[constantsAt(1000).capacitance * length * (1 - 4 * above) * 1e12]])}`,
      columns: { frequency: null, value: 0, frequencyUnit: 'Hz', valueUnit: 'pF' },
    },
  ];
}
