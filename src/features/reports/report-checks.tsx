import type { PortrayedCheck } from '#shared/methods/portrait.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import { ReportSection } from './report-section.tsx';

/** How the answers came about: what is flagged is a caution beside the finding, and changes no figure. */
export function ReportChecks({ checks }: { checks: readonly PortrayedCheck[] }) {
  return (
    <ReportSection
      title="Checks of the answers"
      lede="Each is made for every listener; the smallest p is adjusted for how many they are. They never rescue a result and drop no answer; from 0.01 down a caution stands beside the finding."
    >
      <DataTable
        caption="Checks of the answers"
        columns={[
          { key: 'name', header: 'Check', isRowHeader: true, cell: ({ name }) => name },
          { key: 'tail', header: 'Adjusted p', isFigure: true, cell: ({ tail }) => tail },
          {
            key: 'words',
            header: 'Found',
            cell: ({ words, isFlagged }) =>
              isFlagged ? <StatusWord tone="amber">{words}</StatusWord> : <span className="text-soft">{words}</span>,
          },
        ]}
        rows={checks}
        rowKey={({ name }) => name}
        empty={<p className="text-soft">Too few answers to check anything.</p>}
      />
    </ReportSection>
  );
}
