import type { Report } from '#shared/contracts/reports.ts';
import { countsOf, habitsWords, heardWords, pOfStep, secondWords } from '#shared/findings/check-report-words.ts';
import type { CheckStep } from '#shared/findings/check-result.ts';
import type { Method } from '#shared/methods/method.ts';
import { decibels } from '#shared/protocol/protocol-checks.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import type { Column } from '../../ui/table-column.ts';
import { ReportSection } from './report-section.tsx';

type Known = NonNullable<Report['knownDifferences']>;
type Listener = Known['byListener'][number];

const steps: Column<CheckStep>[] = [
  { key: 'step', header: 'Step', isRowHeader: true, cell: ({ milliDb }) => decibels(milliDb) },
  { key: 'trials', header: 'Trials', isFigure: true, cell: ({ trials }) => trials },
  { key: 'counts', header: 'Answers', isFigure: true, cell: (step) => countsOf(step) },
  { key: 'p', header: 'Exact p', isFigure: true, cell: (step) => pOfStep(step) },
  {
    key: 'heard',
    header: 'Heard',
    cell: (step) => <StatusWord tone={step.isHeard ? 'held' : 'neutral'}>{heardWords(step)}</StatusWord>,
  },
];

const listenerColumns = ([first]: readonly Listener[]): Column<Listener>[] => [
  {
    key: 'listener',
    header: 'Listener',
    isRowHeader: true,
    cell: ({ listener }) => <span className="font-mono">{listener}</span>,
  },
  ...(first?.steps ?? []).map(({ milliDb }, index) => ({
    key: String(milliDb),
    header: decibels(milliDb),
    isFigure: true,
    cell: ({ steps: own }: Listener) => {
      const step = own[index];
      return step === undefined || step.test === null ? 'none' : `${countsOf(step)}, p ${pOfStep(step)}`;
    },
  })),
  {
    key: 'down to',
    header: 'Heard down to',
    isFigure: true,
    cell: ({ sensitiveTo }) => (sensitiveTo === null ? 'no step' : decibels(sensitiveTo)),
  },
];

/** What the check trials came to: apart from the result, which reads none of them. */
export function ReportKnownDifferences({ known, method }: { known: Report['knownDifferences']; method: Method }) {
  if (known === null) return null;
  const hasSteps = known.steps.length > 0;
  return (
    <ReportSection
      title="Known differences"
      lede="Check trials stood among the others, at numbers drawn with the rest, and are no part of the result. Steps are asked from the largest down, each at the registered level, up to the first that was not heard."
    >
      {hasSteps ? (
        <>
          <p className="max-w-3xl text-lg">
            {known.sensitiveTo === null ? (
              'The largest step was not heard.'
            ) : (
              <>
                Sensitive to <strong>{decibels(known.sensitiveTo)}</strong>, in this set-up.
              </>
            )}
          </p>
          <DataTable
            caption="Known differences, step by step"
            columns={steps}
            rows={known.steps}
            rowKey={({ milliDb }) => String(milliDb)}
            empty={null}
          />
          {known.byListener.length > 1 ? (
            <>
              <DataTable
                caption="Known differences by listener"
                columns={listenerColumns(known.byListener)}
                rows={known.byListener}
                rowKey={({ listener }) => listener}
                empty={null}
              />
              <p className="max-w-3xl text-soft">
                By each listener’s own answers, not adjusted for the number of listeners: nobody is named by them.
              </p>
            </>
          ) : null}
        </>
      ) : null}
      <p className="max-w-3xl">{habitsWords(known.same, method)}</p>
      {secondWords(known).map((words) => (
        <p key={words} className="max-w-3xl">
          {words}
        </p>
      ))}
    </ReportSection>
  );
}
