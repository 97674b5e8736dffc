import { useState } from 'react';
import { Button } from '../button.tsx';
import { DataTable } from '../data-table.tsx';
import { EmptyState } from '../empty-state.tsx';
import { Sleeve } from '../sleeve.tsx';
import { StatusWord } from '../status-word.tsx';
import { type Column, sortIn } from '../table-column.ts';
import { GallerySection } from './gallery-section.tsx';

type Sample = { mark: string; place: string; code: string; trials: number; level: 'in' | 'out' };

const samples: Sample[] = [
  { mark: 'S-0418', place: 'Cabinet 2', code: '417', trials: 42, level: 'in' },
  { mark: 'S-0419', place: 'Cabinet 2', code: '086', trials: 42, level: 'in' },
  { mark: 'S-0420', place: 'Sent out for measuring', code: '935', trials: 16, level: 'out' },
  { mark: 'S-0421', place: 'Sealed sample, store', code: '201', trials: 8, level: 'in' },
];

const columns: Array<Column<Sample>> = [
  {
    key: 'mark',
    header: 'Serial mark',
    cell: (row) => <a href="#table">{row.mark}</a>,
    isSortable: true,
    isRowHeader: true,
  },
  { key: 'code', header: 'Blind code', cell: (row) => <Sleeve code={row.code} size="sm" /> },
  { key: 'place', header: 'Kept', cell: (row) => row.place },
  { key: 'trials', header: 'Trials', cell: (row) => row.trials, isSortable: true, isFigure: true },
  {
    key: 'level',
    header: 'Level',
    cell: (row) => <StatusWord tone={row.level === 'in' ? 'held' : 'amber'}>{row.level}</StatusWord>,
  },
];

export function TableSection() {
  const [sort, setSort] = useState('-trials');
  const [page, setPage] = useState(1);
  const { key, direction } = sortIn(sort);
  const order = direction === 'ascending' ? 1 : -1;
  const rows = samples.toSorted((one, other) =>
    key === 'trials' ? order * (one.trials - other.trials) : order * one.mark.localeCompare(other.mark),
  );
  return (
    <GallerySection title="Tables">
      <div id="table">
        <DataTable
          caption="Specimens of this study"
          isCaptionShown
          columns={columns}
          rows={rows}
          rowKey={(row) => row.mark}
          empty={null}
          sort={sort}
          onSort={setSort}
          page={page}
          pageCount={7}
          onPage={setPage}
        />
      </div>
      <DataTable
        caption="Sessions"
        columns={columns}
        rows={[]}
        rowKey={(row) => row.mark}
        empty={
          <EmptyState title="Sessions of this study will be here" action={<Button>Plan the first session</Button>}>
            Each keeps its number for good, whether it is finished or not.
          </EmptyState>
        }
      />
    </GallerySection>
  );
}
