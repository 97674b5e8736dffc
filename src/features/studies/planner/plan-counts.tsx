import { useMemo, useState } from 'react';
import type { CountRow, CountTable } from '#shared/findings/count-table.ts';
import { formatProbability, formatShare } from '#shared/findings/format-probability.ts';
import { DataTable } from '../../../ui/data-table.tsx';
import type { Column } from '../../../ui/table-column.ts';
import type { Plan } from './plan-of.ts';

/** What each count would mean, told before there is one. */
export function PlanCounts({ plan }: { plan: Plan }) {
  const [isOpen, setOpen] = useState(false);
  const { counts } = plan.method.plan;
  if (counts === null || plan.listeners > 1) return <NoCounts plan={plan} />;
  return (
    <details onToggle={(event) => setOpen(event.currentTarget.open)} className="border-t border-rule pt-4">
      <summary className="cursor-pointer rounded text-lg font-bold">What each count would mean</summary>
      {isOpen ? <Counts table={counts} plan={plan} /> : null}
    </details>
  );
}

function Counts({ table, plan: { trials, alpha, choices } }: { table: CountTable; plan: Plan }) {
  const margin = choices.marginPercent === undefined ? null : choices.marginPercent / 100;
  const rows = useMemo(() => table.rows({ trials, alpha, margin }), [table, trials, alpha, margin]);
  return (
    <section
      aria-label="What each count would mean"
      // biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reached by key
      tabIndex={0}
      className="mt-3 max-h-112 overflow-auto"
    >
      <DataTable
        caption={`What each count of ${trials} would mean`}
        columns={columnsOf(table)}
        rows={rows}
        rowKey={({ from }) => String(from)}
        empty={null}
      />
    </section>
  );
}

function columnsOf({ counted, effect }: CountTable): Column<CountRow>[] {
  return [
    {
      key: 'count',
      header: counted,
      isRowHeader: true,
      cell: ({ from, to }) => (
        <span className="whitespace-nowrap">
          <Range from={String(from)} to={String(to)} />
        </span>
      ),
    },
    {
      key: 'p',
      header: 'p',
      isFigure: true,
      cell: ({ p: [first, last] }) => <Range from={formatProbability(first)} to={formatProbability(last)} />,
    },
    {
      key: 'effect',
      header: effect,
      isFigure: true,
      cell: ({ share: [first, last], limits: { lower, upper } }) => (
        <>
          <Range from={formatShare(first, 'nearest')} to={formatShare(last, 'nearest')} />{' '}
          <span className="whitespace-nowrap text-soft">
            ({formatShare(lower, 'down')} to {formatShare(upper, 'up')})
          </span>
        </>
      ),
    },
    {
      key: 'finding',
      header: 'Finding, and what may be said',
      cell: ({ finding, maySay }) => (
        <>
          <strong>{finding.charAt(0).toUpperCase() + finding.slice(1)}.</strong> {maySay}
        </>
      ),
    },
  ];
}

/** The ends of a range, once where they read alike. */
function Range({ from, to }: { from: string; to: string }) {
  return (
    <span className="font-mono">
      <span className="whitespace-nowrap">{from}</span>
      {from === to ? null : (
        <>
          {' to '}
          <span className="whitespace-nowrap">{to}</span>
        </>
      )}
    </span>
  );
}

function NoCounts({ plan: { listeners, method } }: { plan: Plan }) {
  return (
    <section className="flex flex-col gap-1 border-t border-rule pt-4">
      <h3 className="text-lg">What each count would mean</h3>
      <p>
        {listeners > 1
          ? `The same count of ${method.plan.counted} can be a finding or none, depending on how alike the listeners answer: there is one coin per trial, not one per answer. So no table can be given.`
          : method.plan.unfixed}
      </p>
    </section>
  );
}
