import { useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, redirect, useNavigate, useParams, useSearchParams } from 'react-router-dom';
import { attendancesApi } from '#shared/contracts/attendances.ts';
import type { SessionRow } from '#shared/contracts/sessions.ts';
import { paths } from '../app/paths.ts';
import { AttendanceTable } from '../features/attendances/attendance-table.tsx';
import { countWords } from '../features/attendances/attendance-words.ts';
import { attendanceQueries } from '../features/attendances/attendances.queries.ts';
import { InviteListeners } from '../features/attendances/invite-listeners.tsx';
import { ObserverList } from '../features/observers/observer-list.tsx';
import { observerQueries } from '../features/observers/observers.queries.ts';
import { CancelSession } from '../features/sessions/cancel-session.tsx';
import { MoveSession } from '../features/sessions/move-session.tsx';
import { RehearseButton } from '../features/sessions/rehearse-button.tsx';
import { SessionFacts } from '../features/sessions/session-facts.tsx';
import { sessionQueries } from '../features/sessions/sessions.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { lastPageAddress, readListQuery, useListAddress } from '../lib/list-address.ts';
import { queryClient } from '../lib/query-client.ts';
import { isManaging } from '../lib/role-words.ts';
import { param } from '../lib/route-params.ts';
import { EmptyState } from '../ui/empty-state.tsx';
import { LinkButton } from '../ui/link-button.tsx';
import { ListFilter } from '../ui/list-filter.tsx';
import { PageHeader } from '../ui/page-header.tsx';

const queryIn = (search: URLSearchParams) => readListQuery(attendancesApi.list, search);

export async function loader({ params, request }: LoaderFunctionArgs) {
  const url = new URL(request.url);
  const organisationId = param(params, 'organisationId');
  const id = param(params, 'id');
  const [attendances] = await Promise.all([
    queryClient.ensureQueryData(attendanceQueries.list(organisationId, id, queryIn(url.searchParams))),
    queryClient.ensureQueryData(sessionQueries.detail(organisationId, id)),
    queryClient.ensureQueryData(observerQueries.list(organisationId, id)),
  ]);
  const beyond = lastPageAddress(url, attendances);
  return beyond === null ? null : redirect(beyond);
}

export function Component() {
  const { person, membership } = usePresence();
  const { organisationId, role } = membership;
  const id = param(useParams(), 'id');
  const [search] = useSearchParams();
  const change = useListAddress();
  const navigate = useNavigate();
  const query = queryIn(search);
  const { data: session } = useSuspenseQuery(sessionQueries.detail(organisationId, id));
  const { data: attendances } = useSuspenseQuery(attendanceQueries.list(organisationId, id, query));
  const { data: observers } = useSuspenseQuery(observerQueries.list(organisationId, id));
  const isPlanned = session.phase === 'planned';
  const canChange = isManaging(role);
  const isLed = session.proctorId === person.id;

  return (
    <>
      <PageHeader
        title={`${session.title}, session ${session.number}`}
        lede={ledeOf(session, canChange)}
        back={
          canChange
            ? { to: paths.study(organisationId, session.studyId), label: session.title }
            : { to: paths.sessions(organisationId), label: 'Sessions' }
        }
        actions={
          <>
            {isLed ? (
              <LinkButton variant="primary" to={paths.console(organisationId, id)}>
                Go to the console
              </LinkButton>
            ) : null}
            {isLed && isPlanned ? (
              <RehearseButton
                organisationId={organisationId}
                sessionId={id}
                label="Rehearse it"
                onBegun={(rehearsal) => navigate(paths.console(organisationId, rehearsal))}
              />
            ) : null}
            {session.hasLevels ? <LinkButton to={paths.levels(organisationId, id)}>Levels</LinkButton> : null}
            {canChange && isPlanned ? (
              <>
                <MoveSession organisationId={organisationId} session={session} />
                <CancelSession organisationId={organisationId} session={session} />
              </>
            ) : null}
          </>
        }
      />
      <div className="flex flex-col gap-12">
        <div className="max-w-2xl">
          <SessionFacts session={session} seats={countWords(attendances.counts)} />
        </div>
        <section aria-labelledby="invited" className="flex flex-col gap-6">
          <h2 id="invited" className="text-2xl">
            Invited listeners
          </h2>
          {canChange && isPlanned ? <InviteListeners organisationId={organisationId} sessionId={id} /> : null}
          {attendances.pages > 1 || query.q !== '' ? (
            <ListFilter key={query.q} label="Search addresses" words={query.q} onSearch={(q) => change({ q })} />
          ) : null}
          <AttendanceTable
            organisationId={organisationId}
            rows={attendances.rows}
            page={attendances.page}
            pageCount={attendances.pages}
            onPage={(page) => change({ page })}
            isPlanned={isPlanned}
            canChange={canChange}
            empty={query.q === '' ? <NobodyYet isPlanned={isPlanned} canChange={canChange} /> : <NoneFound />}
          />
        </section>
        <ObserverList
          organisationId={organisationId}
          sessionId={id}
          rows={observers.rows}
          canChange={canChange && session.phase !== 'finished' && session.phase !== 'abandoned'}
        />
      </div>
    </>
  );
}

function ledeOf({ phase }: SessionRow, canChange: boolean): string {
  const planned = 'each answers, and takes the seat, by a link of their own.';
  if (phase === 'planned')
    return canChange ? `Planned. Invite listeners; ${planned}` : `Planned. A manager invites listeners; ${planned}`;
  if (phase === 'finished') return 'It is over. Its trials stand on the record.';
  if (phase === 'abandoned') return 'It ended early. It keeps its number, and the record says why.';
  return 'It is under way. Its proctor leads it from the console.';
}

function NobodyYet({ isPlanned, canChange }: { isPlanned: boolean; canChange: boolean }) {
  if (!isPlanned)
    return <p className="text-soft">Nobody was invited. Whoever came joined by the session’s code alone.</p>;
  return (
    <EmptyState title="Nobody is invited yet">
      {canChange
        ? 'Paste addresses above. Listeners can also join by code alone, but then nothing shows that each is a different person, and the report says so.'
        : 'A manager invites listeners. Whoever has no invitation can join by the code on your console.'}
    </EmptyState>
  );
}

function NoneFound() {
  return (
    <EmptyState title="No address is like that" action={<LinkButton to="?">Show all</LinkButton>}>
      Addresses were searched.
    </EmptyState>
  );
}
