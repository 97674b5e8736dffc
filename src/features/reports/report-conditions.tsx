import type { Report } from '#shared/contracts/reports.ts';
import { dbText, handlingWords } from '#shared/levels/level-words.ts';
import type { Portrait } from '#shared/methods/portrait.ts';
import { formatCount, formatDate } from '../../lib/format.ts';
import { type Fact, Facts } from '../../ui/facts.tsx';
import { levelOf, sideWords } from './report-words.ts';

/** The largest difference that was measured, or that none was. */
function levelFact(levels: Report['levels']): Fact {
  const label = 'Level at the load';
  if (levels === null || levels.checks.length === 0)
    return { label, value: 'not recorded', isWords: true, tone: 'amber' };
  const standing = levels.checks.filter(({ isReplaced }) => !isReplaced);
  const most = Math.max(...standing.map(({ differenceMilliDb }) => differenceMilliDb));
  const areIn = standing.every(({ isIn }) => isIn);
  const value = `${handlingWords[levels.handling]}, ${areIn ? `within ${dbText(most)}` : `${dbText(most)} apart`}`;
  return { label, value, isWords: true, ...(areIn ? {} : { tone: 'amber' as const }) };
}

type ReportConditionsProps = {
  report: Report;
  portrait: Portrait;
  /** The public does not take the server's word for its checks; they run in the visitor's browser. */
  isPublic?: boolean;
};

/** The conditions under which the count came about, beside it and never below the fold. */
export function ReportConditions({ report, portrait, isPublic = false }: ReportConditionsProps) {
  const { rung, flow, voids, deviations, result, record, protocol, endedEarly } = report;
  const failed = record.checks.filter(({ outcome }) => outcome === 'fail').length;
  const passed = record.checks.filter(({ outcome }) => outcome === 'pass').length;
  const unsettled = record.checks.length - passed - failed;
  const conditions: Fact[] = [
    { label: 'Blinding', value: rung.name, isWords: true },
    levelFact(report.levels),
    { label: 'Void trials', value: voids.length === 0 ? 'none' : `${flow.trialsVoid}, listed`, isWords: true },
    {
      label: 'Missing answers',
      value: flow.answersMissing === 0 ? 'none' : `${flow.answersMissing}, ${result.missingAnswers}`,
      isWords: true,
    },
    {
      label: 'Deviations',
      value: deviations.length === 0 ? 'none' : `${deviations.length}, listed`,
      isWords: true,
      ...(deviations.length === 0 ? {} : { tone: 'amber' as const }),
    },
    { label: 'Registered level', value: `${levelOf(result.alpha)}, ${sideWords[result.alternative]}` },
    ...portrait.conditions,
    ...(endedEarly === null
      ? []
      : [
          {
            label: 'Ended early',
            value: `at ${formatCount(result.trials, 'trial')}`,
            isWords: true,
            tone: 'amber' as const,
          },
        ]),
  ];
  const checks: Fact[] = [
    { label: 'Checks passed', value: `${passed} of ${record.checks.length}`, tone: failed > 0 ? 'amber' : 'held' },
    ...(unsettled > 0 ? [{ label: 'Not checkable', value: unsettled }] : []),
  ];
  return (
    <section aria-labelledby="conditions" className="flex flex-col gap-8 print:mt-8">
      <h2 id="conditions" className="sr-only">
        Conditions and record
      </h2>
      <div className="flex flex-col gap-2">
        <Facts title="Conditions" facts={conditions} />
        <p className="text-soft">{rung.why}</p>
      </div>
      <Facts
        title="Record"
        facts={[
          { label: 'Protocol sealed', value: formatDate(protocol.sealedAt), isWords: true },
          { label: 'Study closed', value: formatDate(report.closedAt), isWords: true },
          { label: 'Entries', value: record.entries },
          ...(isPublic ? [] : checks),
        ]}
      />
    </section>
  );
}
