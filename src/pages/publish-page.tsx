import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, useNavigate, useParams } from 'react-router-dom';
import type { Report } from '#shared/contracts/reports.ts';
import { paths } from '../app/paths.ts';
import { BeforePublishing } from '../features/publications/before-publishing.tsx';
import { publicationQueries } from '../features/publications/publications.queries.ts';
import { PublishForm } from '../features/publications/publish-form.tsx';
import { reportQueries } from '../features/reports/reports.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { LinkButton } from '../ui/link-button.tsx';
import { Notice } from '../ui/notice.tsx';
import { PageHeader } from '../ui/page-header.tsx';

export async function loader({ params }: LoaderFunctionArgs) {
  const organisationId = param(params, 'organisationId');
  const id = param(params, 'id');
  await Promise.all([
    queryClient.ensureQueryData(reportQueries.detail(organisationId, id)),
    queryClient.ensureQueryData(publicationQueries.ofStudy(organisationId, id)),
  ]);
  return null;
}

export function Component() {
  const { organisationId } = usePresence().membership;
  const id = param(useParams(), 'id');
  const navigate = useNavigate();
  const { data: report } = useSuspenseQuery(reportQueries.detail(organisationId, id));
  const { data } = useSuspenseQuery(publicationQueries.ofStudy(organisationId, id));
  const back = { to: paths.study(organisationId, id), label: report.title };

  if (data.publication !== null)
    return (
      <>
        <PageHeader title="This study is published" back={back} />
        <LinkButton variant="primary" to={paths.publication(data.publication.id)}>
          Open the public page
        </LinkButton>
      </>
    );
  return (
    <>
      <PageHeader
        title={`Publish ${report.title}`}
        lede="The result gets a public page at an address of its own, with everything a stranger needs to check it. The page stays for good."
        back={back}
      />
      <div className="flex flex-col gap-12">
        <Hindrance report={report} />
        <BeforePublishing report={report} />
        <PublishForm
          organisationId={organisationId}
          studyId={id}
          onPublished={(published) => navigate(paths.publication(published.id))}
        />
      </div>
    </>
  );
}

/** Said before anybody fills in a form that the server would refuse. */
function Hindrance({ report }: { report: Report }) {
  const failed = report.record.checks.find(({ outcome }) => outcome !== 'pass');
  const why = report.rung.name === 'open' ? report.rung.why : failed?.reason;
  if (why === undefined) return null;
  return (
    <Notice tone="stop" title="This study cannot be published." className="max-w-3xl">
      {why}
    </Notice>
  );
}
