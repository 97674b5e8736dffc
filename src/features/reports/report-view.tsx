import type { ReactNode } from 'react';
import type { Report } from '#shared/contracts/reports.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { Button } from '../../ui/button.tsx';
import { FindingHead } from './finding-head.tsx';
import { ReportChecks } from './report-checks.tsx';
import { ReportConditions } from './report-conditions.tsx';
import { ReportCueAudit } from './report-cue-audit.tsx';
import { ReportDistribution } from './report-distribution.tsx';
import { ReportExcerpts } from './report-excerpts.tsx';
import { ReportFigures } from './report-figures.tsx';
import { ReportFlow } from './report-flow.tsx';
import { ReportHeads } from './report-heads.tsx';
import { ReportIncidents } from './report-incidents.tsx';
import { ReportKnownDifferences } from './report-known-differences.tsx';
import { ReportLevels } from './report-levels.tsx';
import { ReportListeners } from './report-listeners.tsx';
import { ReportProtocol } from './report-protocol.tsx';
import { ReportRecord } from './report-record.tsx';
import { ReportSaid } from './report-said.tsx';
import { ReportSessions } from './report-sessions.tsx';
import { WhatToSay } from './what-to-say.tsx';

type ReportViewProps = {
  report: Report;
  back: { to: string; label: string };
  /** What can be done with the result, beside printing it. */
  actions?: ReactNode;
  /** What the cables are made of, where whoever reads may see it. */
  compared?: ReactNode;
  /** Where keys, signatures and tokens can be downloaded. */
  proofs: string;
};

/** The finding first, then what it rests on, down to every answer. */
export function ReportView({ report, back, actions, compared, proofs }: ReportViewProps) {
  const { result, cables } = report;
  const method = methodOf(result.method);
  const portrait = method.portray(result, cables);
  return (
    <article className="flex flex-col gap-14">
      <div className="grid gap-x-16 gap-y-10 lg:grid-cols-[minmax(0,1fr)_21rem] lg:items-start print:block">
        <div className="flex min-w-0 flex-col gap-8">
          <FindingHead report={report} back={back} />
          <ReportFigures figures={portrait.figures} note={portrait.note} />
          <WhatToSay finding={report.finding} />
          <div className="flex flex-wrap gap-3 print:hidden">
            {actions}
            <Button onClick={() => window.print()}>Print the report</Button>
          </div>
        </div>
        <ReportConditions report={report} portrait={portrait} />
      </div>
      <ReportDistribution nullDistribution={report.nullDistribution} distribution={portrait.distribution} />
      <ReportListeners listeners={portrait.listeners} />
      <ReportKnownDifferences known={report.knownDifferences} method={method} />
      <ReportExcerpts byExcerpt={report.byExcerpt} />
      <ReportChecks checks={portrait.checks} />
      {report.levels === null ? null : <ReportLevels levels={report.levels} />}
      <ReportCueAudit audit={report.cueAudit} />
      <ReportSaid said={report.said} />
      <ReportFlow flow={report.flow} missingWords={result.missingAnswers} />
      <ReportIncidents
        voids={report.voids}
        missing={report.missing}
        deviations={report.deviations}
        missingWords={result.missingAnswers}
      />
      <ReportSessions sessions={report.sessions} cables={cables} method={method} />
      {compared}
      <ReportProtocol protocol={report.protocol} />
      <ReportRecord record={report.record} />
      <ReportHeads record={report.record} proofs={proofs} />
    </article>
  );
}
