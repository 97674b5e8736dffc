import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, useParams } from 'react-router-dom';
import { paths } from '../app/paths.ts';
import { ReportView } from '../features/reports/report-view.tsx';
import { reportQueries } from '../features/reports/reports.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';

export async function loader({ params }: LoaderFunctionArgs) {
  const organisationId = param(params, 'organisationId');
  await queryClient.ensureQueryData(reportQueries.detail(organisationId, param(params, 'id')));
  return null;
}

export function Component() {
  const { organisationId } = usePresence().membership;
  const id = param(useParams(), 'id');
  const { data: report } = useSuspenseQuery(reportQueries.detail(organisationId, id));
  return <ReportView report={report} back={{ to: paths.reports(organisationId), label: 'All reports' }} />;
}
