import type { PlanWords } from '#shared/methods/method.ts';
import type { PlanFigures } from '#shared/statistics/plan-figures.ts';
import { powerPercent } from './plan-words.ts';

type PowerTableProps = Pick<PlanFigures, 'power'> & { words: Pick<PlanWords, 'found' | 'atRate'> };

/** Three rates side by side, each with the chance that the test finds it. */
export function PowerTable({ power, words }: PowerTableProps) {
  return (
    <table className="w-full border-collapse">
      <caption className="sr-only">Chance of finding {words.found}, by how often answers are as named</caption>
      <thead>
        <tr className="border-b border-rule">
          <td />
          {power.map(({ rate }) => (
            <th key={rate} scope="col" className="py-1.5 pl-3 text-right align-bottom font-normal">
              {words.atRate(rate)}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        <tr className="border-b border-rule">
          <th scope="row" className="py-1.5 text-left font-normal whitespace-nowrap text-soft">
            found in
          </th>
          {power.map(({ rate, power: found }) => (
            <td key={rate} className="py-1.5 pl-3 text-right font-mono font-semibold whitespace-nowrap">
              {powerPercent(found)}
            </td>
          ))}
        </tr>
        <tr className="border-b border-rule">
          <th scope="row" className="py-1.5 text-left font-normal whitespace-nowrap text-soft">
            missed in
          </th>
          {power.map(({ rate, power: found }) => (
            <td key={rate} className="py-1.5 pl-3 text-right font-mono whitespace-nowrap">
              {powerPercent(1 - found)}
            </td>
          ))}
        </tr>
      </tbody>
    </table>
  );
}
