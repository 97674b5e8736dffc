import type { FrequencySeries } from './frequency-chart.tsx';
import { hertzFace } from './frequency-chart.tsx';

type FrequencyTableProps = {
  caption: string;
  quantity: string;
  series: readonly FrequencySeries[];
  format: (value: number) => string;
};

const mostRows = 120;

/** A chart's figures as a table, behind a word that opens it: at the frequencies that were observed, where any were. */
export function FrequencyTable({ caption, quantity, series, format }: FrequencyTableProps) {
  const observed = series.filter(({ isWorkedOut }) => !isWorkedOut);
  const from = observed.length > 0 ? observed : series;
  const all = [...new Set(from.flatMap(({ points }) => points.map(({ frequency }) => frequency)))].sort(
    (a, b) => a - b,
  );
  const step = Math.ceil(all.length / mostRows);
  const rows = all.filter((_, index) => index % step === 0);
  const values = series.map(({ points }) => new Map(points.map(({ frequency, value }) => [frequency, value])));
  return (
    <details>
      <summary className="inline-block min-h-8 cursor-pointer rounded underline underline-offset-4 hover:decoration-2">
        The same as a table
      </summary>
      {step > 1 ? (
        <p className="pt-2 text-soft">
          Every {step}th of {all.length} frequencies.
        </p>
      ) : null}
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: whatever scrolls must be reached by keyboard */}
      <section className="max-w-full overflow-x-auto" aria-label={caption} tabIndex={0}>
        <table className="mt-3 border-collapse">
          <caption className="sr-only">{caption}</caption>
          <thead>
            <tr className="border-b-2 border-ink text-left align-bottom">
              <th scope="col" className="py-2 pr-4 sm:pr-8">
                Frequency
              </th>
              {series.map(({ name }) => (
                <th key={name} scope="col" className="py-2 pr-4 text-right sm:pr-8">
                  {name}
                  <span className="block font-normal text-soft">{quantity}</span>
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {rows.map((frequency) => (
              <tr key={frequency} className="border-b border-rule">
                <th scope="row" className="py-1 pr-4 text-left font-mono font-normal whitespace-nowrap sm:pr-8">
                  {hertzFace(frequency)}
                </th>
                {series.map(({ name }, index) => {
                  const value = values[index]?.get(frequency);
                  return (
                    <td key={name} className="py-1 pr-4 text-right font-mono whitespace-nowrap sm:pr-8">
                      {value === undefined ? '' : format(value)}
                    </td>
                  );
                })}
              </tr>
            ))}
          </tbody>
        </table>
      </section>
    </details>
  );
}
