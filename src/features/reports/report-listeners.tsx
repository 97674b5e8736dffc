import type { Report } from '#shared/contracts/reports.ts';
import { formatProbability } from '#shared/findings/format-probability.ts';
import type { ListenerResult } from '#shared/findings/registered-result.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import type { Column } from '../../ui/table-column.ts';
import { ListenerIntervals } from './listener-intervals.tsx';
import { ReportSection } from './report-section.tsx';
import { percentOf } from './report-words.ts';

const columns: Column<ListenerResult>[] = [
  {
    key: 'listener',
    header: 'Listener',
    isRowHeader: true,
    cell: ({ listener }) => <span className="font-mono">{listener}</span>,
  },
  { key: 'correct', header: 'Matched', isFigure: true, cell: ({ correct, answers }) => `${correct} of ${answers}` },
  { key: 'missing', header: 'Missing', isFigure: true, cell: ({ missing }) => missing },
  { key: 'p', header: 'Exact p', isFigure: true, cell: ({ p }) => formatProbability(Number(p)) },
  { key: 'holmP', header: 'p by Holm', isFigure: true, cell: ({ holmP }) => formatProbability(Number(holmP)) },
  {
    key: 'interval',
    header: 'Rate, 95 % interval',
    isFigure: true,
    cell: ({ correct, answers, interval }) =>
      `${Math.round((correct / answers) * 100)} %, ${percentOf(interval.lower, 'down')} to ${percentOf(interval.upper, 'up')}`,
  },
  {
    key: 'isAboveGuessing',
    header: 'May be named',
    cell: ({ isAboveGuessing }) =>
      isAboveGuessing ? <StatusWord tone="held">yes</StatusWord> : <StatusWord>no</StatusWord>,
  },
];

/** Listeners side by side: each against guessing, and adjusted for how many of them there are. */
export function ReportListeners({ result }: Pick<Report, 'result'>) {
  return (
    <ReportSection
      title="By listener"
      lede="One listener gives one answer per trial, so the binomial test is exact for each of them. Only somebody whose p still reaches the level after Holm’s adjustment for all listeners may be named. Intervals are Clopper-Pearson, 95 %."
    >
      {result.byListener.length > 0 ? (
        <ListenerIntervals byListener={result.byListener} chance={result.chance} />
      ) : null}
      <DataTable
        caption="Results by listener"
        columns={columns}
        rows={result.byListener}
        rowKey={({ listener }) => listener}
        empty={<p className="text-soft">Nobody gave an answer.</p>}
      />
    </ReportSection>
  );
}
