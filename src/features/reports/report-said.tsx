import { fatigues } from '#shared/contracts/remarks.ts';
import type { Report } from '#shared/contracts/reports.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { ReportSection } from './report-section.tsx';

const noticedWords = { yes: 'Yes', no: 'No' } as const;

/** What listeners said after the last trial and at breaks: every one, nothing chosen. */
export function ReportSaid({ said: { exits, fatigue } }: Pick<Report, 'said'>) {
  const breaks = [...new Map(fatigue.map((one) => [`${one.session} ${one.break}`, one])).values()];
  const count = (of: (typeof fatigue)[number], what: (typeof fatigues)[number]) =>
    fatigue.filter((one) => one.session === of.session && one.break === of.break && one.fatigue === what).length;
  return (
    <ReportSection
      title="What listeners said"
      lede="After their last trial, in their words, every answer that was given. What was drawn was hidden from everybody then."
    >
      <DataTable
        caption="Exit questions"
        columns={[
          {
            key: 'listener',
            header: 'Listener',
            isRowHeader: true,
            cell: (row) => `${row.listener}, session ${row.session}`,
          },
          { key: 'wentBy', header: 'Went by', cell: ({ wentBy }) => wentBy || '–' },
          {
            key: 'noticed',
            header: 'Anything but the music',
            cell: ({ noticed, what }) =>
              noticed === null ? '–' : `${noticedWords[noticed]}${what === '' ? '' : `: ${what}`}`,
          },
          {
            key: 'guesses',
            header: 'Thought they were',
            cell: ({ guesses }) =>
              guesses.every(({ text }) => text === '')
                ? '–'
                : guesses
                    .filter(({ text }) => text !== '')
                    .map(({ question, text }) => <span key={question} className="block">{`${question} ${text}`}</span>),
          },
        ]}
        rows={exits}
        rowKey={({ session, listener }) => `${session} ${listener}`}
        empty={<p className="text-soft">Nobody answered the exit questions.</p>}
      />
      {breaks.length === 0 ? null : (
        <DataTable
          caption="How listeners felt at breaks"
          columns={[
            {
              key: 'break',
              header: 'Break',
              isRowHeader: true,
              cell: (row) => `Session ${row.session}, break ${row.break}`,
            },
            ...fatigues.map((what) => ({
              key: what,
              header: `${what.charAt(0).toUpperCase()}${what.slice(1)}`,
              isFigure: true,
              cell: (row: (typeof fatigue)[number]) => count(row, what),
            })),
          ]}
          rows={breaks}
          rowKey={(row) => `${row.session} ${row.break}`}
          empty={null}
        />
      )}
    </ReportSection>
  );
}
