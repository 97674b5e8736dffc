import type { Report } from '#shared/contracts/reports.ts';
import type { Method } from '#shared/methods/method.ts';
import { handlingWords } from '#shared/session/handling.ts';
import { formatCount, formatDateTime } from '../../lib/format.ts';
import { CourseLine } from '../../ui/course-line.tsx';
import { ReportSection } from './report-section.tsx';
import { SessionTrials } from './session-trials.tsx';

type Session = Report['sessions'][number];

type ReportSessionsProps = Pick<Report, 'sessions' | 'cables'> & { method: Method };

/** Every session, whatever became of it; numbers have no gaps. */
export function ReportSessions({ sessions, cables, method }: ReportSessionsProps) {
  return (
    <ReportSection title="Every session" lede={method.trials.legend}>
      {sessions.length === 0 ? <p className="text-soft">No session was opened.</p> : null}
      <ol className="flex flex-col gap-8">
        {sessions.map((session) => (
          <li key={session.number} className="flex flex-col gap-3 border-t border-rule pt-4 print:break-inside-auto">
            <SessionHead session={session} />
            {session.trials.length > 0 ? (
              <>
                <CourseLine trials={courseOf(session)} />
                <details className="group print:[&::details-content]:block print:[&::details-content]:[content-visibility:visible]">
                  <summary className="min-h-12 cursor-pointer py-2.5 font-semibold underline-offset-4 hover:underline print:hidden">
                    The {formatCount(session.trials.length, 'trial')} of session {session.number}
                  </summary>
                  <SessionTrials session={session} cables={cables} method={method} />
                </details>
              </>
            ) : null}
          </li>
        ))}
      </ol>
    </ReportSection>
  );
}

function SessionHead({ session }: { session: Session }) {
  const { number, phase, room, startedAt, endedAt, listeners, training, drawn, reason, handling } = session;
  return (
    <div className="flex flex-col gap-0.5">
      <h3 className="text-lg">
        Session {number}, {phase}
      </h3>
      <p className="text-soft">
        {[
          ...(room === '' ? [] : [room]),
          formatCount(listeners, 'listener'),
          startedAt === null ? 'never started' : `started ${formatDateTime(startedAt)}`,
          ...(endedAt === null ? [] : [`ended ${formatDateTime(endedAt)}`]),
        ].join(', ')}
      </p>
      <TrainingLine {...training} />
      {drawn === null ? null : <p className="text-soft">{drawn}</p>}
      {handlingWords(handling).map((words) => (
        <p key={words} className="text-soft">
          {words}
        </p>
      ))}
      {reason === null ? null : <p className="font-semibold">Reason: {reason}</p>}
    </div>
  );
}

/** What was heard before the first trial and never counted. */
function TrainingLine({ labelled, blind, feedback }: Session['training']) {
  const parts = [
    ...(labelled === 0 ? [] : [`both cables labelled, ${labelled === 1 ? 'once' : `${labelled} times`}`]),
    ...(blind === 0 ? [] : [`${formatCount(blind, 'blind practice trial')}`]),
    ...(feedback === 0 ? [] : [`${formatCount(feedback, 'practice trial')} with feedback on known differences`]),
  ];
  if (parts.length === 0) return null;
  return <p className="text-soft">Heard first, not counted: {parts.join('; ')}.</p>;
}

/** A trial that never locked stays an open ring. */
function courseOf({ trials }: Session) {
  return trials.map(({ trial, outcome }) => ({ number: trial, state: outcome }));
}
