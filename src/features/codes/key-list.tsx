import type { CodeSheet } from '#shared/contracts/codes.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { Sleeve } from '../../ui/sleeve.tsx';
import type { Column } from '../../ui/table-column.ts';

const columns: Column<CodeSheet['rows'][number]>[] = [
  { key: 'code', header: 'Code', isRowHeader: true, cell: ({ code }) => <Sleeve code={code} size="sm" /> },
  { key: 'cable', header: 'Cable', cell: ({ cable }) => cable },
  { key: 'serial', header: 'Mark on the specimen', cell: ({ serial }) => <span className="font-mono">{serial}</span> },
  {
    key: 'scanText',
    header: 'Read by a scanner',
    cell: ({ labels }) =>
      labels.map(({ end, scanText }) => (
        <span key={end} className="block font-mono">
          {scanText}
        </span>
      )),
  },
];

/** The key itself, for the holder's own use; on paper it is a page of its own. */
export function KeyList({ title, rows }: CodeSheet) {
  return (
    <section aria-labelledby="key-list" className="flex flex-col gap-4 print:break-before-page">
      <div className="flex flex-col gap-1.5 border-[3px] border-stop px-5 py-4">
        <h2 id="key-list" className="text-2xl">
          Keep this from everyone else
        </h2>
        <p>
          The code key of “{title}”. Whoever reads it is no longer blind. Lock it away, or destroy it once the labels
          are on.
        </p>
      </div>
      <DataTable
        caption="Which code belongs on which specimen"
        columns={columns}
        rows={rows}
        rowKey={({ code }) => code}
        empty={null}
      />
    </section>
  );
}
