import { useNavigate, useParams } from 'react-router-dom';
import { DimLayout } from '../app/layouts/dim-layout.tsx';
import { paths } from '../app/paths.ts';
import { ConsoleBody } from '../features/console/console-body.tsx';
import { ConsoleHead } from '../features/console/console-head.tsx';
import { nextActOf } from '../features/console/next-act.ts';
import { SeatsPanel } from '../features/console/seats-panel.tsx';
import { SideActs } from '../features/console/side-acts.tsx';
import { useConsole } from '../features/console/use-console.ts';
import { useKeySetting } from '../features/console/use-keys.ts';
import { useLabels } from '../features/console/use-labels.ts';
import { ExposureFacts } from '../features/exposure/exposure-facts.tsx';
import { RehearseButton } from '../features/sessions/rehearse-button.tsx';
import { param } from '../lib/route-params.ts';
import { CourseLine } from '../ui/course-line.tsx';
import { useDocumentTitle } from '../ui/document-title.ts';
import { LinkButton } from '../ui/link-button.tsx';

/** The proctor's console. */
export function Component() {
  const params = useParams();
  const organisationId = param(params, 'organisationId');
  const sessionId = param(params, 'id');
  const navigate = useNavigate();
  const console = useConsole(sessionId);
  const keys = useKeySetting();
  const back = { to: paths.sessions(organisationId), label: 'All sessions' };
  const { view, refused, connection, clockOffsetMs } = console;
  const labels = useLabels(view, console);
  useDocumentTitle(view === null ? 'Console' : `${view.title}, session ${view.session}`);

  if (refused !== null) return <Outside title="This console cannot be opened" detail={refused.message} back={back} />;
  if (view === null) return <Outside title="Opening the console" detail="Waiting for the server." back={back} />;
  const isLost = connection === 'lost';
  const next = nextActOf(view);
  const goOn = () => {
    if (next === null || console.isBusy || isLost) return;
    const isTooEarly = next.opensAt !== null && Date.now() + clockOffsetMs < next.opensAt;
    if (!isTooEarly) void console.act(next.command);
  };
  const hasCourse = view.phase === 'revealing' || view.phase === 'running';
  const isOver = view.phase === 'finished' || view.phase === 'abandoned';
  return (
    <DimLayout
      header={
        <ConsoleHead view={view} isLost={isLost} clockOffsetMs={clockOffsetMs} back={back}>
          {view.phase === 'planned' && !view.rehearsal ? (
            <RehearseButton
              organisationId={organisationId}
              sessionId={sessionId}
              label="Rehearse it first"
              onBegun={(id) => navigate(paths.console(organisationId, id))}
            />
          ) : null}
        </ConsoleHead>
      }
    >
      <div className="flex flex-1 flex-col lg:flex-row">
        <ConsoleBody
          view={view}
          clockOffsetMs={clockOffsetMs}
          isLost={isLost}
          actions={console}
          next={next}
          onNext={goOn}
          back={back}
          levelsTo={view.rehearsal ? null : paths.levels(organisationId, sessionId)}
          labels={labels}
          areKeysOn={keys[0]}
        />
        <SeatsPanel view={view} clockOffsetMs={clockOffsetMs} actions={console}>
          {view.rehearsal || view.sound === null ? null : (
            <ExposureFacts organisationId={organisationId} sessionId={sessionId} tenthsDba={view.sound.tenthsDba} />
          )}
        </SeatsPanel>
      </div>
      {isOver ? null : (
        <div className="flex flex-col gap-4 border-t border-rule px-5 py-4 lg:px-11">
          {hasCourse ? <CourseLine trials={view.course} /> : null}
          <SideActs view={view} actions={console} onNext={next === null ? null : goOn} keys={keys} labels={labels} />
        </div>
      )}
    </DimLayout>
  );
}

function Outside({ title, detail, back }: { title: string; detail: string; back: { to: string; label: string } }) {
  return (
    <DimLayout>
      <div role="status" className="flex flex-1 flex-col items-center justify-center gap-5 px-5 text-center">
        <h1 className="text-2xl">{title}</h1>
        <p className="text-soft">{detail}</p>
        <LinkButton to={back.to}>{back.label}</LinkButton>
      </div>
    </DimLayout>
  );
}
