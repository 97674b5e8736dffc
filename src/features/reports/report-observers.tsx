import type { Report } from '#shared/contracts/reports.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { ReportSection } from './report-section.tsx';

/** Who signed that they watched; somebody with another duty in the study is no witness. */
export function ReportObservers({ observers }: Pick<Report, 'observers'>) {
  return (
    <ReportSection
      title="Observers"
      lede="What each signed, beside what the server measured by their page’s connection. Somebody with another duty in the study is no witness: nobody can vouch for their own work."
    >
      <DataTable
        caption="Who watched"
        columns={[
          {
            key: 'observer',
            header: 'Observer',
            isRowHeader: true,
            cell: ({ session, observer, name }) => `${name ?? observer}, session ${session}`,
          },
          {
            key: 'watched',
            header: 'Trials watched',
            isFigure: true,
            cell: ({ watched, of }) => `${watched.length} of ${of}`,
          },
          {
            key: 'duties',
            header: 'Other duties',
            cell: ({ duties }) => (duties.length === 0 ? 'none' : duties.join(', ')),
          },
          { key: 'remarks', header: 'What they saw', cell: ({ remarks }) => remarks || '–' },
        ]}
        rows={observers}
        rowKey={({ session, observer }) => `${session} ${observer}`}
        empty={<p className="text-soft">Nobody signed that they watched.</p>}
      />
    </ReportSection>
  );
}
