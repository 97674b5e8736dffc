import type { ReactNode } from 'react';
import type { Report } from '#shared/contracts/reports.ts';
import { Claim } from '../../ui/claim.tsx';

/** What becomes public, read once more: the finding, its claim, and every word that people wrote during the study. */
export function BeforePublishing({ report }: { report: Report }) {
  const { finding } = report;
  const written = wordsWritten(report);
  return (
    <div className="flex max-w-3xl flex-col gap-8">
      <Part title="The finding">
        <p className="text-lg">{finding.headline}</p>
        {finding.maySay === null ? (
          <p className="text-soft">It supports no claim; published, it still tells others what was tried.</p>
        ) : (
          <Claim>{finding.maySay}</Claim>
        )}
      </Part>
      <Part title="What was written during the study">
        <p className="text-soft">
          Names of people, rooms and places at the table are left out: listeners appear as L01, L02 and so on. These
          words cannot be left out, because the record would no longer hold.
        </p>
        {written.length === 0 ? (
          <p>Nothing was written.</p>
        ) : (
          <ul className="border-t border-rule">
            {written.map(({ where, words }) => (
              <li
                key={`${where} ${words}`}
                className="grid gap-x-6 border-b border-rule py-2 sm:grid-cols-[14rem_minmax(0,1fr)]"
              >
                <span className="text-soft">{where}</span>
                <span className="whitespace-pre-line">{words}</span>
              </li>
            ))}
          </ul>
        )}
      </Part>
    </div>
  );
}

function wordsWritten({ voids, deviations, sessions, endedEarly }: Report): { where: string; words: string }[] {
  return [
    ...voids
      .filter(({ note }) => note !== '')
      .map(({ session, trial, note }) => ({ where: `Void, session ${session}, trial ${trial}`, words: note })),
    ...sessions.flatMap(({ number, reason }) =>
      reason === null ? [] : [{ where: `Session ${number} abandoned`, words: reason }],
    ),
    ...deviations.map(({ session, text }) => ({
      where: session === null ? 'Deviation' : `Deviation, session ${session}`,
      words: text,
    })),
    ...(endedEarly === null ? [] : [{ where: 'Ended early', words: endedEarly }]),
  ];
}

function Part({ title, children }: { title: string; children: ReactNode }) {
  return (
    <section className="flex flex-col gap-3">
      <h2 className="text-xl">{title}</h2>
      {children}
    </section>
  );
}
