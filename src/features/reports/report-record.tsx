import { notShown } from '#shared/contracts/publications.ts';
import type { Report } from '#shared/contracts/reports.ts';
import { CopyButton } from '../../ui/copy-button.tsx';
import { DataTable } from '../../ui/data-table.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import type { Column } from '../../ui/table-column.ts';
import { ReportSection } from './report-section.tsx';

type Check = Report['record']['checks'][number];

const tones: Record<Check['outcome'], 'held' | 'stop' | 'amber'> = {
  pass: 'held',
  fail: 'stop',
  'not checkable': 'amber',
};

const columns: Column<Check>[] = [
  { key: 'name', header: 'Check', isRowHeader: true, cell: ({ name }) => name },
  {
    key: 'outcome',
    header: 'Outcome',
    cell: ({ outcome }) => <StatusWord tone={tones[outcome]}>{outcome}</StatusWord>,
  },
  { key: 'reason', header: 'Why', cell: ({ reason }) => reason },
];

/** The record, line by line: what it shows, and what no software can show. */
export function ReportRecord({ record }: Pick<Report, 'record'>) {
  return (
    <ReportSection title="The record, checked" lede={notShown}>
      <DataTable
        caption="Checks of the record"
        columns={columns}
        rows={record.checks}
        rowKey={({ name }) => name}
        empty={<p className="text-soft">No check has run on this record.</p>}
      />
      <div className="flex flex-col gap-1.5">
        <p className="text-soft">Head of the record after {record.entries} entries, SHA-256</p>
        <code className="break-all">{record.head}</code>
        <CopyButton text={record.head} label="Copy the head" />
      </div>
    </ReportSection>
  );
}
