import type { Report } from '#shared/contracts/reports.ts';
import type { Method } from '#shared/methods/method.ts';
import { classNames } from '../../ui/class-names.ts';
import { DataTable } from '../../ui/data-table.tsx';
import type { Column } from '../../ui/table-column.ts';

type Session = Report['sessions'][number];
type Trial = Session['trials'][number];

const outcomeWords: Record<Trial['outcome'], string> = { locked: '', void: ', void', open: ', never locked' };

/** What X was and who answered what, trial by trial: by answer, so that a full room still fits the page. */
export function SessionTrials({ session, method }: { session: Session; method: Method }) {
  return (
    <DataTable
      caption={`Trials of session ${session.number}`}
      columns={columnsFor(session, method)}
      rows={session.trials}
      rowKey={({ trial }) => String(trial)}
      empty={null}
    />
  );
}

function columnsFor({ trials }: Session, method: Method): Column<Trial>[] {
  const hasMissing = trials.some((trial) => missingIn(trial).length > 0);
  const hasLongChanges = trials.some(({ longChanges }) => longChanges > 0);
  return [
    {
      key: 'trial',
      header: 'Trial',
      isRowHeader: true,
      cell: ({ trial, outcome }) => `${trial}${outcomeWords[outcome]}`,
    },
    { key: 'excerpt', header: 'Excerpt', cell: ({ excerpt }) => excerpt },
    { key: 'truth', header: 'X was', cell: ({ truth }) => <span className="font-mono">{truth}</span> },
    ...method.options.map(({ value }) => ({
      key: value,
      header: `Answered ${value}`,
      cell: (trial: Trial) => <Labels of={answeredIn(trial, value)} isRight={method.isRight(value, trial.truth)} />,
    })),
    ...(hasMissing
      ? [{ key: 'missing', header: 'Missing', cell: (trial: Trial) => <Labels of={missingIn(trial)} /> }]
      : []),
    { key: 'matched', header: 'Matched', isFigure: true, cell: (trial) => matchedOf(trial, method) },
    ...(hasLongChanges
      ? [{ key: 'long', header: 'Long changes', isFigure: true, cell: ({ longChanges }: Trial) => longChanges }]
      : []),
  ];
}

function answeredIn({ answers }: Trial, choice: string | null): string[] {
  return answers.filter((answer) => answer.choice === choice).map(({ listener }) => listener);
}

/** Nobody owes an answer to a trial that was set aside. */
function missingIn(trial: Trial): string[] {
  return trial.outcome === 'locked' ? answeredIn(trial, null) : [];
}

function Labels({ of, isRight = false }: { of: readonly string[]; isRight?: boolean }) {
  if (of.length === 0) return <span className="text-soft">none</span>;
  return <span className={classNames('font-mono', isRight && 'font-bold')}>{of.join(' ')}</span>;
}

/** A void trial is shown, answers and all, and does not count. */
function matchedOf({ outcome, answers, truth }: Trial, method: Method): string {
  if (outcome !== 'locked') return 'not counted';
  const matched = answers.filter(({ choice }) => choice !== null && method.isRight(choice, truth)).length;
  return `${matched} of ${answers.length}`;
}
