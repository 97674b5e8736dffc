import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, useParams } from 'react-router-dom';
import { paths } from '../app/paths.ts';
import { CableFacts } from '../features/cables/cable-facts.tsx';
import { cableQueries, useArchiveCable } from '../features/cables/cables.queries.ts';
import { Consequences } from '../features/cables/consequences.tsx';
import { Specimens } from '../features/cables/specimens.tsx';
import { usePresence } from '../features/sign-in/membership.ts';
import { queryClient } from '../lib/query-client.ts';
import { param } from '../lib/route-params.ts';
import { problemText } from '../lib/show-problem.ts';
import { Button } from '../ui/button.tsx';
import { LinkButton } from '../ui/link-button.tsx';
import { Notice } from '../ui/notice.tsx';
import { PageHeader } from '../ui/page-header.tsx';
import { useToast } from '../ui/toast.tsx';

export function loader({ params }: LoaderFunctionArgs) {
  return queryClient.ensureQueryData(cableQueries.detail(param(params, 'organisationId'), param(params, 'id')));
}

export function Component() {
  const { organisationId } = usePresence().membership;
  const id = param(useParams(), 'id');
  const { data: cable } = useSuspenseQuery(cableQueries.detail(organisationId, id));
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
          <Consequences cable={cable} editTo={paths.editCable(organisationId, id)} />
        </div>
        <CableFacts cable={cable} />
      </div>
    </>
  );
}
