import type { PlanWords } from '#shared/methods/method.ts';
import { powerPercent } from './plan-words.ts';

type PowerTableProps = {
  /** The rate that is looked for, then a small, a middling and a large one. */
  power: readonly { readonly rate: number; readonly power: number }[];
  words: Pick<PlanWords, 'found' | 'atRate'>;
};

/** Rates side by side, each once, with the chance that the test finds it. */
export function PowerTable({ power: all, words }: PowerTableProps) {
  const power = all
    .filter(({ rate }, index) => all.findIndex((other) => words.atRate(other.rate) === words.atRate(rate)) === index)
    .toSorted((a, b) => a.rate - b.rate);
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
