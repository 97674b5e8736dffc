import type { ReactNode } from 'react';
import type { Report } from '#shared/contracts/reports.ts';
import { formatCount, formatDateTime } from '../../lib/format.ts';
import { ReportSection } from './report-section.tsx';

type Incidents = Pick<Report, 'voids' | 'missing' | 'deviations'> & { missingWords: string };

/** Whatever did not go as planned: void trials, missing answers, deviations. */
export function ReportIncidents({ voids, missing, deviations, missingWords }: Incidents) {
  return (
    <ReportSection title="What did not go as planned">
      <Incident title="Void trials" none="No trial was set aside.">
        {voids.map((entry) => (
          <Line key={`${entry.session} ${entry.trial}`} where={trialName(entry)}>
            {entry.reason}
            {entry.note === '' ? null : <span className="text-soft">: {entry.note}</span>}
            {entry.answersHeld > 0 ? (
              <strong className="block text-amber">
                {formatCount(entry.answersHeld, 'answer was', 'answers were')} already held when it was set aside.
              </strong>
            ) : null}
          </Line>
        ))}
      </Incident>
      <Incident title="Missing answers" none="Every answer that was due was given.">
        {missing.map((entry) => (
          <Line key={`${entry.session} ${entry.trial} ${entry.listener}`} where={trialName(entry)}>
            <span className="font-mono">{entry.listener}</span>: {entry.why}; {missingWords}.
          </Line>
        ))}
      </Incident>
      <Incident title="Deviations from the protocol" none="None was recorded.">
        {deviations.map((entry) => (
          <Line
            key={`${entry.at} ${entry.text}`}
            where={`${formatDateTime(entry.at)}${entry.session === null ? '' : `, session ${entry.session}`}`}
          >
            <span className="whitespace-pre-line">{entry.text}</span>
          </Line>
        ))}
      </Incident>
    </ReportSection>
  );
}

function trialName({ session, trial }: { session: number; trial: number }): string {
  const name = trial > 0 ? `trial ${trial}` : trial === 0 ? 'familiarisation' : `practice ${-trial}`;
  return `Session ${session}, ${name}`;
}

function Incident({ title, none, children }: { title: string; none: string; children: ReactNode[] }) {
  return (
    <div className="flex max-w-4xl flex-col gap-2">
      <h3 className="text-lg">{title}</h3>
      {children.length === 0 ? (
        <p className="text-soft">{none}</p>
      ) : (
        <ul className="border-t border-rule">{children}</ul>
      )}
    </div>
  );
}

function Line({ where, children }: { where: string; children: ReactNode }) {
  return (
    <li className="grid gap-x-6 border-b border-rule py-2.5 sm:grid-cols-[14rem_minmax(0,1fr)]">
      <span className="text-soft">{where}</span>
      <div>{children}</div>
    </li>
  );
}
