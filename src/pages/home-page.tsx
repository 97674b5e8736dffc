import { useQuery, useSuspenseQuery } from '@tanstack/react-query';
import type { LoaderFunctionArgs } from 'react-router-dom';
import { cablesApi } from '#shared/contracts/cables.ts';
import type { Role } from '#shared/contracts/endpoint.ts';
import { sessionsApi } from '#shared/contracts/sessions.ts';
import { studiesApi } from '#shared/contracts/studies.ts';
import { paths } from '../app/paths.ts';
import { cableQueries } from '../features/cables/cables.queries.ts';
import { DemoPath } from '../features/home/demo-path.tsx';
import { homeQueries } from '../features/home/home.queries.ts';
import type { HomePlaces } from '../features/home/home-places.ts';
import { NobodyElse, NoReportWaits, NoSessionWaits, NothingWaits } from '../features/home/nothing-waits.tsx';
import { WaitingList } from '../features/home/waiting-list.tsx';
import { organisationQueries } from '../features/organisations/organisations.queries.ts';
import { LatestPublications } from '../features/publications/latest-publications.tsx';
import { publicationQueries } from '../features/publications/publications.queries.ts';
import { sessionQueries } from '../features/sessions/sessions.queries.ts';
import { type Presence, presenceIn, usePresence } from '../features/sign-in/membership.ts';
import { signInQueries } from '../features/sign-in/sign-in.queries.ts';
import { SignInAs } from '../features/sign-in/sign-in-as.tsx';
import { studyQueries } from '../features/studies/studies.queries.ts';
import { readListQuery } from '../lib/list-address.ts';
import { queryClient } from '../lib/query-client.ts';
import { isManaging } from '../lib/role-words.ts';
import { param } from '../lib/route-params.ts';
import { PageHeader } from '../ui/page-header.tsx';

const asUsual = new URLSearchParams();
const firstCables = (organisationId: string) =>
  cableQueries.list(organisationId, readListQuery(cablesApi.list, asUsual));
const firstStudies = (organisationId: string) =>
  studyQueries.list(organisationId, readListQuery(studiesApi.list, asUsual));
const latestSessions = (organisationId: string) =>
  sessionQueries.list(organisationId, readListQuery(sessionsApi.list, asUsual));

export async function loader({ params }: LoaderFunctionArgs) {
  const organisationId = param(params, 'organisationId');
  const presence = presenceIn(await queryClient.ensureQueryData(signInQueries.me()), organisationId);
  const isManager = isManaging(presence.membership.role);
  const isDemo = presence.demoPeople.length > 0;
  await Promise.all([
    queryClient.ensureQueryData(homeQueries.waiting(organisationId)),
    queryClient.ensureQueryData(publicationQueries.list({ organisationId })),
    isManager ? queryClient.ensureQueryData(firstCables(organisationId)) : null,
    isManager ? queryClient.ensureQueryData(firstStudies(organisationId)) : null,
    isDemo || isManager ? queryClient.ensureQueryData(organisationQueries.members(organisationId)) : null,
    isDemo && seesSessions(presence) ? queryClient.ensureQueryData(latestSessions(organisationId)) : null,
  ]);
  return null;
}

export function Component() {
  const presence = usePresence();
  const { organisationId, role, organisation } = presence.membership;
  const { data } = useSuspenseQuery(homeQueries.waiting(organisationId));
  const { data: published } = useSuspenseQuery(publicationQueries.list({ organisationId }));
  const places = placesIn(organisationId);

  return (
    <>
      <PageHeader title="What waits for you" lede={`${presence.person.name}, ${organisation}`} />
      <div className="grid gap-x-20 gap-y-14 lg:grid-cols-[minmax(0,1fr)_minmax(0,28rem)]">
        <div className="flex min-w-0 flex-col gap-14">
          {data.items.length > 0 ? (
            <WaitingList items={data.items} places={places} />
          ) : (
            <EmptyHome role={role} organisationId={organisationId} places={places} />
          )}
          {role === 'proctor' ? null : (
            <LatestPublications
              title="Published by you"
              rows={published.rows}
              allTo={paths.publications()}
              hrefOf={paths.publication}
            />
          )}
        </div>
        {presence.demoPeople.length > 0 ? <Demo presence={presence} places={places} /> : null}
      </div>
    </>
  );
}

type EmptyHomeProps = { role: Role; organisationId: string; places: HomePlaces };

function EmptyHome({ role, organisationId, places }: EmptyHomeProps) {
  if (role === 'proctor') return <NoSessionWaits places={places} />;
  if (role === 'reviewer') return <NoReportWaits places={places} />;
  return <EmptyManagerHome role={role} organisationId={organisationId} places={places} />;
}

function EmptyManagerHome({ role, organisationId, places }: EmptyHomeProps) {
  const { members } = useSuspenseQuery(organisationQueries.members(organisationId)).data;
  const { data: cables } = useSuspenseQuery(firstCables(organisationId));
  const { data: studies } = useSuspenseQuery(firstStudies(organisationId));
  const isAlone = role === 'owner' && members.length === 1 && cables.total === 0;
  if (isAlone) return <NobodyElse places={places} />;
  return <NothingWaits inventory={{ cableCount: cables.total, studyCount: studies.total }} places={places} />;
}

const seesSessions = ({ membership }: Presence) => membership.role !== 'reviewer';

function Demo({ presence, places }: { presence: Presence; places: HomePlaces }) {
  const { organisationId } = presence.membership;
  const { data } = useSuspenseQuery(organisationQueries.members(organisationId));
  const { data: waiting } = useSuspenseQuery(homeQueries.waiting(organisationId));
  const { data: sessions } = useQuery({ ...latestSessions(organisationId), enabled: seesSessions(presence) });
  return (
    <DemoPath
      people={presence.demoPeople}
      members={data.members}
      sessions={sessions?.rows ?? []}
      closedStudyIds={waiting.items.filter(({ kind }) => kind === 'report-to-read').map(({ studyId }) => studyId)}
      personId={presence.person.id}
      places={places}
      renderSignIn={(person, goTo) => <SignInAs person={person} goTo={goTo} />}
    />
  );
}

function placesIn(organisationId: string): HomePlaces {
  return {
    start: paths.start(),
    study: (id) => paths.study(organisationId, id),
    editStudy: (id) => paths.editStudy(organisationId, id),
    codes: (studyId) => paths.codes(organisationId, studyId),
    planSession: (studyId) => paths.planSession(organisationId, studyId),
    levels: (id) => paths.levels(organisationId, id),
    console: (id) => paths.console(organisationId, id),
    report: (studyId) => paths.report(organisationId, studyId),
    newCable: paths.newCable(organisationId),
    newStudy: paths.newStudy(organisationId),
    sessions: paths.sessions(organisationId),
    reports: paths.reports(organisationId),
    people: paths.people(organisationId),
  };
}
