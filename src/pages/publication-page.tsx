import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, useParams } from 'react-router-dom';
import { publicationsApi } from '#shared/contracts/publications.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { paths } from '../app/paths.ts';
import { publicationQueries } from '../features/publications/publications.queries.ts';
import { Statements } from '../features/publications/statements.tsx';
import { VerificationSection } from '../features/publications/verification-section.tsx';
import { FindingHead } from '../features/reports/finding-head.tsx';
import { ReportChecks } from '../features/reports/report-checks.tsx';
import { ReportConditions } from '../features/reports/report-conditions.tsx';
import { ReportCueAudit } from '../features/reports/report-cue-audit.tsx';
import { ReportDistribution } from '../features/reports/report-distribution.tsx';
import { ReportExcerpts } from '../features/reports/report-excerpts.tsx';
import { ReportFigures } from '../features/reports/report-figures.tsx';
import { ReportFlow } from '../features/reports/report-flow.tsx';
import { ReportHeads } from '../features/reports/report-heads.tsx';
import { ReportIncidents } from '../features/reports/report-incidents.tsx';
import { ReportKnownDifferences } from '../features/reports/report-known-differences.tsx';
import { ReportListeners } from '../features/reports/report-listeners.tsx';
import { ReportProtocol } from '../features/reports/report-protocol.tsx';
import { ReportSaid } from '../features/reports/report-said.tsx';
import { ReportSessions } from '../features/reports/report-sessions.tsx';
import { WhatToSay } from '../features/reports/what-to-say.tsx';
import { addressOf } from '../lib/call.ts';
import { formatDate } from '../lib/format.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { Notice } from '../ui/notice.tsx';

export async function loader({ params }: LoaderFunctionArgs) {
  await queryClient.ensureQueryData(publicationQueries.detail(param(params, 'id')));
  return null;
}

export function Component() {
  const { data: publication } = useSuspenseQuery(publicationQueries.detail(param(useParams(), 'id')));
  const { report, withdrawn, publisher, publishedAt } = publication;
  const method = methodOf(report.result.method);
  const portrait = method.portray(report.result, report.cables);
  const finding = withdrawn === null ? report.finding : { ...report.finding, maySay: null };
  return (
    <article className="flex flex-col gap-14">
      <div className="grid gap-x-16 gap-y-10 lg:grid-cols-[minmax(0,1fr)_21rem] lg:items-start print:block">
        <div className="flex min-w-0 flex-col gap-8">
          {withdrawn === null ? null : (
            <Notice tone="stop" title={`Withdrawn ${formatDate(withdrawn.at)}.`} className="max-w-3xl">
              {withdrawn.reason} Nothing may be claimed on it any more. The page stays.
            </Notice>
          )}
          <FindingHead report={report} back={{ to: paths.publications(), label: 'All published results' }} />
          <p className="text-soft">
            Published <time dateTime={publishedAt}>{formatDate(publishedAt)}</time> by {publisher}
          </p>
          <ReportFigures figures={portrait.figures} note={portrait.note} />
          <WhatToSay finding={finding} title="What may be said" />
        </div>
        <ReportConditions report={report} portrait={portrait} isPublic />
      </div>
      <VerificationSection publication={publication} verifyTo={paths.verify()} />
      <Statements publication={publication} />
      <ReportDistribution nullDistribution={report.nullDistribution} distribution={portrait.distribution} />
      <ReportListeners listeners={portrait.listeners} />
      <ReportKnownDifferences known={report.knownDifferences} method={method} />
      <ReportExcerpts byExcerpt={report.byExcerpt} />
      <ReportChecks checks={portrait.checks} />
      <ReportCueAudit audit={report.cueAudit} />
      <ReportSaid said={report.said} />
      <ReportFlow flow={report.flow} missingWords={report.result.missingAnswers} />
      <ReportIncidents
        voids={report.voids}
        missing={report.missing}
        deviations={report.deviations}
        missingWords={report.result.missingAnswers}
      />
      <ReportSessions sessions={report.sessions} cables={report.cables} method={method} />
      <ReportProtocol protocol={report.protocol} />
      <ReportHeads record={report.record} proofs={addressOf(publicationsApi.signedHeads, { id: publication.id })} />
    </article>
  );
}
