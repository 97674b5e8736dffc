import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, redirect, useParams, useSearchParams } from 'react-router-dom';
import { measurementsApi } from '#shared/contracts/measurements.ts';
import { paths } from '../app/paths.ts';
import { CableFacts } from '../features/cables/cable-facts.tsx';
import { cableQueries, useArchiveCable } from '../features/cables/cables.queries.ts';
import { Consequences } from '../features/cables/consequences.tsx';
import { Specimens } from '../features/cables/specimens.tsx';
import { evidenceQueries } from '../features/evidence/evidence.queries.ts';
import { Statements } from '../features/evidence/statements.tsx';
import { MeasurementSection } from '../features/measurements/measurement-section.tsx';
import { measurementQueries } from '../features/measurements/measurements.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { lastPageAddress, readListQuery, useListAddress } from '../lib/list-address.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { problemText } from '../lib/show-problem.ts';
import { Button } from '../ui/button.tsx';
import { LinkButton } from '../ui/link-button.tsx';
import { Notice } from '../ui/notice.tsx';
import { PageHeader } from '../ui/page-header.tsx';
import { useToast } from '../ui/toast.tsx';

const queryIn = (search: URLSearchParams) => readListQuery(measurementsApi.list, search);

export async function loader({ params, request }: LoaderFunctionArgs) {
  const [organisationId, id] = [param(params, 'organisationId'), param(params, 'id')];
  const url = new URL(request.url);
  const list = measurementQueries.list(organisationId, id, queryIn(url.searchParams));
  const [measurements] = await Promise.all([
    queryClient.ensureQueryData(list),
    queryClient.ensureQueryData(cableQueries.detail(organisationId, id)),
    queryClient.ensureQueryData(measurementQueries.curves(organisationId, id)),
    queryClient.ensureQueryData(evidenceQueries.list(organisationId, id)),
  ]);
  const beyond = lastPageAddress(url, measurements);
  return beyond === null ? null : redirect(beyond);
}

export function Component() {
  const { organisationId } = usePresence().membership;
  const id = param(useParams(), 'id');
  const { data: cable } = useSuspenseQuery(cableQueries.detail(organisationId, id));
  const [search] = useSearchParams();
  const change = useListAddress();
  const query = queryIn(search);
  const { data: measurements } = useSuspenseQuery(measurementQueries.list(organisationId, id, query));
  const { curves } = useSuspenseQuery(measurementQueries.curves(organisationId, id)).data;
  const { evidence } = useSuspenseQuery(evidenceQueries.list(organisationId, id)).data;
  const archive = useArchiveCable(organisationId, id);
  const showToast = useToast();

  function setArchived(archived: boolean) {
    archive.mutate(archived, {
      onSuccess: () => showToast(archived ? `${cable.name} is archived.` : `${cable.name} is back in use.`, 'held'),
      onError: (error) => showToast(problemText(error), 'amber'),
    });
  }

  return (
    <>
      <PageHeader
        title={cable.name}
        back={{ to: paths.cables(organisationId), label: 'All cables' }}
        actions={
          <>
            <LinkButton to={paths.compareCables(organisationId, id)}>Compare</LinkButton>
            {cable.specimens.filter(({ archived }) => !archived).length > 1 ? (
              <LinkButton to={paths.newStudy(organisationId, [id, id])}>Study a treatment</LinkButton>
            ) : null}
            <LinkButton to={paths.editCable(organisationId, id)}>Change the design</LinkButton>
            <Button busy={archive.isPending} busyLabel="Saving" onClick={() => setArchived(!cable.archived)}>
              {cable.archived ? 'Bring back' : 'Archive'}
            </Button>
          </>
        }
      />
      {cable.archived ? (
        <Notice title="Archived." className="mb-8 max-w-3xl">
          New studies cannot choose this cable. Studies that have it keep it.
        </Notice>
      ) : null}
      <div className="grid gap-x-16 gap-y-12 lg:grid-cols-[minmax(0,1fr)_22rem]">
        <div className="flex min-w-0 flex-col gap-12">
          <Specimens organisationId={organisationId} cable={cable} />
          <MeasurementSection
            cable={cable}
            curves={curves}
            measurements={measurements}
            query={query}
            onChange={change}
            addTo={paths.newMeasurement(organisationId, id)}
            hrefOf={(measurementId) => paths.measurement(organisationId, id, measurementId)}
          />
          <Consequences cable={cable} editTo={paths.editCable(organisationId, id)} />
          <Statements organisationId={organisationId} cable={cable} evidence={evidence} />
        </div>
        <CableFacts cable={cable} />
      </div>
    </>
  );
}
