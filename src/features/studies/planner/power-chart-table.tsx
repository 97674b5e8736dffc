import type { PowerPoint } from '#shared/statistics/planned-power.ts';
import { powerPercent } from './plan-words.ts';

type PowerChartTableProps = {
  points: readonly PowerPoint[];
  planned: number;
  needed: { nFirst: number | null; nSafe: number | null };
  caption: string;
};

const mostRows = 60;

/** The chart's figures, thinned out to what can be read, behind a word that opens them. */
export function PowerChartTable({ points, planned, needed: { nFirst, nSafe }, caption }: PowerChartTableProps) {
  const step = Math.ceil(points.length / mostRows);
  const rows = points.filter(({ trials }, index) => index % step === 0 || [planned, nFirst, nSafe].includes(trials));
  const remarkOn = (trials: number) =>
    [trials === nFirst && 'first above', trials === nSafe && 'stays above', trials === planned && 'planned']
      .filter(Boolean)
      .join(', ');
  return (
    <details className="print:hidden">
      <summary className="inline-block min-h-8 cursor-pointer rounded underline underline-offset-4 hover:decoration-2">
        As a table
      </summary>
      <section
        aria-label={caption}
        // biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reached by key
        tabIndex={0}
        className="mt-3 max-h-72 overflow-y-auto"
      >
        <table className="w-full border-collapse">
          <caption className="sr-only">{caption}</caption>
          <thead>
            <tr className="border-b-2 border-ink text-left">
              <th scope="col" className="py-1.5 pr-6">
                Trials
              </th>
              <th scope="col" className="py-1.5 pr-6 text-right">
                Chance
              </th>
              <th scope="col" className="py-1.5">
                Remark
              </th>
            </tr>
          </thead>
          <tbody>
            {rows.map(({ trials, power }) => (
              <tr key={trials} className="border-b border-rule">
                <th scope="row" className="py-1 pr-6 text-left font-mono font-normal">
                  {trials}
                </th>
                <td className="py-1 pr-6 text-right font-mono whitespace-nowrap">{powerPercent(power)}</td>
                <td className="py-1">{remarkOn(trials)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </section>
    </details>
  );
}
