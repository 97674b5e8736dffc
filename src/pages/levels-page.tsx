import { useQuery, useSuspenseQuery } from '@tanstack/react-query';
import { type LoaderFunctionArgs, useParams, useSearchParams } from 'react-router-dom';
import type { LevelsPage } from '#shared/contracts/levels.ts';
import { registeredLevelsText } from '#shared/levels/level-words.ts';
import { levelCheckWords } from '#shared/levels/measured-levels.ts';
import { paths } from '../app/paths.ts';
import { LevelForm } from '../features/levels/level-form.tsx';
import { LevelOutcome } from '../features/levels/level-outcome.tsx';
import { levelQueries } from '../features/levels/levels.queries.ts';
import { LevelsTaken } from '../features/levels/levels-taken.tsx';
import { MeasureAlone } from '../features/levels/measure-alone.tsx';
import { MeasurerChoice } from '../features/levels/measurer-choice.tsx';
import { organisationQueries } from '../features/organisations/organisations.queries.ts';
import { usePresence } from '../features/sign-in/membership.ts';
import { queryClient } from '../lib/query-client.ts';
import { isManaging } from '../lib/role-words.ts';
import { param } from '../lib/route-params.ts';
import { EmptyState } from '../ui/empty-state.tsx';
import { LinkButton } from '../ui/link-button.tsx';
import { Notice } from '../ui/notice.tsx';
import { PageHeader } from '../ui/page-header.tsx';
import { useToast } from '../ui/toast.tsx';

const isAlone = (search: URLSearchParams) => search.get('measure') === 'alone';

export async function loader({ params, request }: LoaderFunctionArgs) {
  const alone = isAlone(new URL(request.url).searchParams);
  await queryClient.ensureQueryData(
    levelQueries.ofSession(param(params, 'organisationId'), param(params, 'id'), alone),
  );
  return null;
}

/** The levels of a session: entered by whoever measures, in or out for everybody else. */
export function Component() {
  const { organisationId, role } = usePresence().membership;
  const id = param(useParams(), 'id');
  const [search, setSearch] = useSearchParams();
  const alone = isAlone(search);
  const { data: page } = useSuspenseQuery(levelQueries.ofSession(organisationId, id, alone));
  const showToast = useToast();
  const measures = page.duty === 'measurer' || (page.duty === 'proctor' && alone);
  const back =
    isManaging(role) || page.duty === 'proctor'
      ? { to: paths.session(organisationId, id), label: `${page.title}, session ${page.session}` }
      : { to: paths.home(organisationId), label: 'Home' };
  const { registered } = page;

  return (
    <>
      <PageHeader title="Levels at the load" lede={ledeOf(page)} back={back} />
      {registered === null ? (
        <EmptyState title="No level is measured in this study">
          Its protocol registers none. The report says that level was not recorded, and that loudness may explain a
          difference.
        </EmptyState>
      ) : (
        <div className="flex flex-col gap-10">
          <div className="flex max-w-3xl flex-col gap-4">
            <p className="text-soft">Registered: {registeredLevelsText(registered)}.</p>
            {page.bar === null ? null : (
              <Notice tone="amber" title="The session cannot start yet.">
                {page.bar}
              </Notice>
            )}
            {page.duty === 'proctor' && !alone ? (
              <Waiting page={page}>
                {page.open.length > 0 ? <MeasureAlone onConfirm={() => setSearch({ measure: 'alone' })} /> : null}
                <LinkButton to={paths.console(organisationId, id)}>Go to the console</LinkButton>
              </Waiting>
            ) : null}
          </div>
          <section aria-labelledby="taken" className="flex max-w-3xl flex-col gap-4">
            <h2 id="taken" className="text-2xl">
              So far
            </h2>
            <LevelsTaken taken={page.taken} />
            <OwnFigures page={{ ...page, registered }} />
          </section>
          {page.duty === 'manager' ? <Assign organisationId={organisationId} page={page} /> : null}
          {measures ? (
            <section aria-labelledby="measure" className="flex flex-col gap-6">
              <h2 id="measure" className="text-2xl">
                Measure
              </h2>
              <Measure
                organisationId={organisationId}
                page={{ ...page, registered }}
                alone={page.duty === 'proctor'}
                onSaved={(check) => showToast(`Levels ${levelCheckWords[check]} are on the record.`, 'held')}
              />
            </section>
          ) : null}
        </div>
      )}
    </>
  );
}

type Registered = LevelsPage & { registered: NonNullable<LevelsPage['registered']> };

function ledeOf({ title, session, duty, measurer }: LevelsPage): string {
  const which = `${title}, session ${session}.`;
  if (duty === 'measurer') return `${which} You measure, and you alone see the figures until the study is closed.`;
  const who = measurer === null ? 'Nobody is named to measure them' : `${measurer.name} measures them`;
  return `${which} ${who}; you see whether they are in or out.`;
}

function Waiting({ page, children }: { page: LevelsPage; children: React.ReactNode }) {
  const who = page.measurer?.name ?? 'Somebody whom a manager names';
  return (
    <div className="flex flex-col gap-4">
      <p>
        {page.due === null
          ? 'Nothing is due now.'
          : `Levels ${levelCheckWords[page.due]} are due. ${who} enters them on this page of their own, and the console follows.`}
      </p>
      <div className="flex flex-wrap gap-3">{children}</div>
    </div>
  );
}

/** The figures that whoever asks may see: their own, and after closing everybody's. */
function OwnFigures({ page: { taken, registered } }: { page: Registered }) {
  const own = taken.flatMap(({ measured }) => measured ?? []);
  const before = own.findLast(({ check }) => check === 'before') ?? null;
  return (
    <div className="grid gap-8 sm:grid-cols-2">
      {own.map((measured, index) => (
        <LevelOutcome
          // biome-ignore lint/suspicious/noArrayIndexKey: measurements are only ever added
          key={index}
          title={`Measured ${levelCheckWords[measured.check]}`}
          measured={measured}
          first={measured.check === 'before' ? null : before}
          registered={registered}
        />
      ))}
    </div>
  );
}

type MeasureProps = {
  organisationId: string;
  page: Registered;
  alone: boolean;
  onSaved: (check: LevelsPage['taken'][number]['check']) => void;
};

function Measure({ organisationId, page, alone, onSaved }: MeasureProps) {
  if (!page.codesAreDrawn)
    return (
      <EmptyState title="No codes are drawn yet">
        The code holder draws them first; then each can be measured.
      </EmptyState>
    );
  if (page.open.length === 0)
    return (
      <EmptyState title="Nothing is to be measured now">
        Levels are measured before the session starts, between two trials, and once the last trial is over.
      </EmptyState>
    );
  return (
    <LevelForm
      // Another check begins with an empty table.
      key={page.taken.filter(({ measured }) => measured !== null).length}
      organisationId={organisationId}
      page={page}
      asProctor={alone}
      onSaved={onSaved}
    />
  );
}

function Assign({ organisationId, page }: { organisationId: string; page: LevelsPage }) {
  const { data } = useQuery(organisationQueries.members(organisationId));
  if (data === undefined) return null;
  return (
    <section aria-labelledby="who" className="flex flex-col gap-4">
      <h2 id="who" className="text-2xl">
        Who measures
      </h2>
      <p className="max-w-2xl text-soft">
        Somebody who runs no session of this study: whoever measures sees how loud each code is. {page.proctor} runs
        this one.
      </p>
      <MeasurerChoice organisationId={organisationId} page={page} members={data.members} />
    </section>
  );
}
