import type { PortrayedCueAudit } from '#shared/cue-audit/portrayed-cue-audit.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import { CuePictureFigure } from './cue-picture.tsx';
import { ReportSection } from './report-section.tsx';

/** Whether anything but the sound told what was drawn: what was found first, with its picture, then every cue. */
export function ReportCueAudit({ audit }: { audit: PortrayedCueAudit }) {
  return (
    <ReportSection
      title="Cue audit"
      lede="Does anything but the sound tell what was drawn, or do answers go with it? Asked of every step and pause on the record, of the place in the session and of plain patterns. All p are adjusted together: where nothing but the sound told anything, the audit finds something in at most 5 % of studies. It never changes a result."
    >
      <p className="max-w-3xl text-lg">
        {audit.isFound ? <StatusWord tone="amber">{audit.summary}</StatusWord> : audit.summary}
      </p>
      {audit.found.length === 0 ? null : (
        <ul className="flex flex-col gap-8">
          {audit.found.map(({ words, picture }) => (
            <li key={words} className="flex max-w-3xl flex-col gap-3 border-l-[5px] border-amber pl-4">
              <p>{words}</p>
              {picture === null ? null : <CuePictureFigure picture={picture} />}
            </li>
          ))}
        </ul>
      )}
      <DataTable
        caption="Every cue"
        columns={[
          { key: 'cue', header: 'Cue', isRowHeader: true, cell: ({ cue }) => cue },
          { key: 'tells', header: 'Tells, adjusted p', isFigure: true, cell: ({ tells }) => tells ?? 'not asked' },
          {
            key: 'followed',
            header: 'Followed, adjusted p',
            isFigure: true,
            cell: ({ followed }) => followed ?? 'not asked',
          },
          {
            key: 'words',
            header: 'Found',
            cell: ({ words, isFound }) =>
              isFound ? <StatusWord tone="amber">{words}</StatusWord> : <span className="text-soft">{words}</span>,
          },
        ]}
        rows={audit.rows}
        rowKey={({ cue }) => cue}
        empty={<p className="text-soft">Nothing was presented.</p>}
      />
    </ReportSection>
  );
}
