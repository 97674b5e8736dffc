import { meanAt } from '#shared/measurements/measured-line.ts';
import { withUnit } from '../../lib/format.ts';
import type { PairSide } from './pair.ts';

const rows = [
  { quantity: 'resistance', word: 'Resistance', unit: 'mΩ', factor: 1e3 },
  { quantity: 'inductance', word: 'Inductance', unit: 'µH', factor: 1e6 },
  { quantity: 'capacitance', word: 'Capacitance', unit: 'pF', factor: 1e12 },
  { quantity: 'impedance', word: 'Impedance', unit: 'mΩ', factor: 1e3 },
] as const;

/** What was measured of both cables, side by side: the mean of the pieces at 1 kHz. */
export function MeasuredPair({ first, second }: { first: PairSide; second: PairSide }) {
  const shown = rows.flatMap((row) => {
    const [one, other] = [first, second].map(({ curves }) => meanAt(curves, row.quantity, 1000));
    return one == null || other == null ? [] : [{ ...row, one, other }];
  });
  if (shown.length === 0) return null;
  return (
    <table className="w-full max-w-3xl border-collapse">
      <caption className="pb-2 text-left text-soft">Measured at 1 kHz, the mean of the pieces</caption>
      <thead>
        <tr className="border-b-2 border-ink align-bottom">
          <td />
          <th scope="col" className="py-2 pr-4 text-right">
            {first.cable.name}
          </th>
          <th scope="col" className="py-2 pr-4 text-right">
            {second.cable.name}
          </th>
          <th scope="col" className="py-2 text-right">
            Ratio
          </th>
        </tr>
      </thead>
      <tbody>
        {shown.map(({ quantity, word, unit, factor, one, other }) => (
          <tr key={quantity} className="border-b border-rule">
            <th scope="row" className="py-2 pr-4 text-left font-normal">
              {word}
            </th>
            {[one, other].map((value, index) => (
              <td key={index === 0 ? 'one' : 'other'} className="py-2 pr-4 text-right font-mono whitespace-nowrap">
                {withUnit(String(Number((value * factor).toPrecision(4))), unit)}
              </td>
            ))}
            <td className="py-2 text-right font-mono">{other === 0 ? '' : (one / other).toFixed(2)}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
