import type { Portrait } from '#shared/methods/portrait.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import type { Column } from '../../ui/table-column.ts';
import { ListenerIntervals } from './listener-intervals.tsx';
import { ReportSection } from './report-section.tsx';

type Listeners = Portrait['listeners'];
type Row = Listeners['rows'][number];

function columnsOf({ columns }: Listeners): Column<Row>[] {
  return [
    {
      key: 'listener',
      header: 'Listener',
      isRowHeader: true,
      cell: ({ listener }) => <span className="font-mono">{listener}</span>,
    },
    ...columns.map(({ header, isFigure }, index) => ({
      key: header,
      header,
      isFigure,
      cell: ({ cells }: Row) => cells[index],
    })),
    {
      key: 'named',
      header: 'May be named',
      cell: ({ named }) =>
        named === null ? <StatusWord>no</StatusWord> : <StatusWord tone="held">{named}</StatusWord>,
    },
  ];
}

type ReportListenersProps = { listeners: Listeners };

/** Listeners side by side, and adjusted for how many of them there are. */
export function ReportListeners({ listeners }: ReportListenersProps) {
  const { lede, rows, chart } = listeners;
  return (
    <ReportSection title="By listener" lede={lede.map((words) => <p key={words}>{words}</p>)}>
      {chart.rows.length > 0 ? <ListenerIntervals chart={chart} /> : null}
      <DataTable
        caption="Results by listener"
        columns={columnsOf(listeners)}
        rows={rows}
        rowKey={({ listener }) => listener}
        empty={<p className="text-soft">Nobody gave an answer.</p>}
      />
    </ReportSection>
  );
}
