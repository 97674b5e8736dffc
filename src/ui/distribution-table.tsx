import type { DistributionBar, DistributionEdges, ShownDistribution } from './distribution-bars.ts';
import { percentFace } from './percent-face.ts';

type DistributionTableProps = {
  shown: ShownDistribution;
  observed: number;
  edges: DistributionEdges;
  quantity: string;
};

/** The chart's figures as a table, behind a word that opens it. */
export function DistributionTable({ shown, observed, edges, quantity }: DistributionTableProps) {
  const lowest = shown.bars[0]?.from;
  const highest = shown.bars.at(-1)?.to;
  return (
    <details className="print:hidden">
      <summary className="inline-block min-h-8 cursor-pointer rounded underline underline-offset-4 hover:decoration-2">
        The same as a table
      </summary>
      <table className="mt-3 border-collapse">
        <caption className="sr-only">{quantity}, with the chance of each</caption>
        <thead>
          <tr className="border-b-2 border-ink text-left">
            <th scope="col" className="py-2 pr-4 sm:pr-8">
              {quantity}
            </th>
            <th scope="col" className="py-2 pr-4 sm:pr-8 text-right">
              Chance
            </th>
            <th scope="col" className="py-2">
              Remark
            </th>
          </tr>
        </thead>
        <tbody>
          {shown.below > 0 ? <TableRow name={`fewer than ${lowest}`} chance={shown.below} /> : null}
          {shown.bars.map((bar) => (
            <TableRow
              key={bar.from}
              name={bar.from === bar.to ? String(bar.from) : `${bar.from} to ${bar.to}`}
              chance={bar.chance}
              remark={remarkOn(bar, observed, edges)}
            />
          ))}
          {shown.above > 0 ? <TableRow name={`more than ${highest}`} chance={shown.above} /> : null}
        </tbody>
      </table>
    </details>
  );
}

function remarkOn(bar: DistributionBar, observed: number, { limit, beyond }: DistributionEdges): string {
  const holds = (count: number) => bar.from <= count && count <= bar.to;
  return [
    holds(observed) ? 'observed' : '',
    limit !== undefined && holds(limit) ? 'registered limit' : '',
    beyond !== undefined && bar.isBeyond ? 'counts towards p' : '',
  ]
    .filter(Boolean)
    .join(', ');
}

function TableRow({ name, chance, remark }: { name: string; chance: number; remark?: string }) {
  return (
    <tr className="border-b border-rule">
      <th scope="row" className="py-1 pr-4 sm:pr-8 text-left font-mono font-normal">
        {name}
      </th>
      <td className="py-1 pr-4 sm:pr-8 text-right font-mono whitespace-nowrap">{percentFace(chance)}</td>
      <td className="py-1">{remark}</td>
    </tr>
  );
}
