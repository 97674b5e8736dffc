import type { Report } from '#shared/contracts/reports.ts';
import type { AnswerOption, Method } from '#shared/methods/method.ts';
import { classNames } from '../../ui/class-names.ts';
import { DataTable } from '../../ui/data-table.tsx';
import type { Column } from '../../ui/table-column.ts';

type Session = Report['sessions'][number];
type Trial = Session['trials'][number];

const outcomeWords: Record<Trial['outcome'], string> = { locked: '', void: ', void', open: ', never locked' };

type SessionTrialsProps = { session: Session; cables: Report['cables']; method: Method };

/** What was drawn and who answered what, trial by trial: by answer, so that a full room still fits the page. */
export function SessionTrials({ session, cables, method }: SessionTrialsProps) {
  return (
    <DataTable
      caption={`Trials of session ${session.number}`}
      columns={columnsFor(session, cables, method)}
      rows={session.trials}
      rowKey={({ trial }) => String(trial)}
      empty={null}
    />
  );
}

function columnsFor({ trials }: Session, cables: Report['cables'], method: Method): Column<Trial>[] {
  const words = method.trials;
  const hasMissing = trials.some((trial) => missingIn(trial).length > 0);
  const isAsked = trials.some(({ requested }) => requested !== null);
  const hasLongChanges = trials.some(({ longChanges }) => longChanges > 0);
  return [
    {
      key: 'trial',
      header: 'Trial',
      isRowHeader: true,
      cell: ({ trial, outcome, check }) => `${trial}${outcomeWords[outcome]}${check === null ? '' : `, ${check.name}`}`,
    },
    { key: 'excerpt', header: 'Excerpt', cell: ({ excerpt }) => excerpt },
    { key: 'truth', header: words.drawnHeader, cell: ({ truth, check }) => words.drawn(truth, check?.pair ?? cables) },
    ...optionsIn(trials, method).map((option) => ({
      key: option.value,
      header: words.answeredHeader(option),
      cell: (trial: Trial) => (
        <Labels
          of={answeredIn(trial, option.value)}
          isRight={isScored(trial) && (words.isRight?.(option.value, trial.truth) ?? false)}
        />
      ),
    })),
    ...(hasMissing
      ? [{ key: 'missing', header: 'Missing', cell: (trial: Trial) => <Labels of={missingIn(trial)} /> }]
      : []),
    ...(isAsked ? [{ key: 'requested', header: 'Asked for', cell: askedIn }] : []),
    { key: 'counted', header: words.countHeader(cables), isFigure: true, cell: (trial) => countedOf(trial, method) },
    ...(hasLongChanges
      ? [{ key: 'long', header: 'Long changes', isFigure: true, cell: ({ longChanges }: Trial) => longChanges }]
      : []),
  ];
}

/** The same with the same has no right answer. */
const isScored = ({ check }: Trial) => check === null || check.pair[0] !== check.pair[1];

/** The answers that every study of the method offers, and of the others those that were given. */
function optionsIn(trials: readonly Trial[], method: Method): readonly AnswerOption[] {
  const given = new Set(trials.flatMap(({ answers }) => answers.map(({ choice }) => choice)));
  const always = method.options({}).map(({ value }) => value);
  const all = method.options({ methodSettings: method.settings.map(({ id }) => id) });
  return all.filter(({ value }) => always.includes(value) || given.has(value));
}

function answeredIn({ answers }: Trial, choice: string | null): string[] {
  return answers.filter((answer) => answer.choice === choice).map(({ listener }) => listener);
}

/** "A 2, B 1, X 3" */
function askedIn({ requested }: Trial): string {
  return (requested ?? []).map(({ label, times }) => `${label}\u00a0${times}`).join(', ');
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
function countedOf(trial: Trial, method: Method): string {
  const { outcome, answers, truth } = trial;
  if (outcome === 'locked' && !isScored(trial)) return 'no right answer';
  return outcome === 'locked' ? method.trials.count(answers, truth) : 'not counted';
}
