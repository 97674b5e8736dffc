import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import type { KeptPreset } from '#shared/contracts/rig-presets.ts';
import { leastChangeS } from '#shared/protocol/rig-preset.ts';
import { formatDate } from '../../lib/format.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { LinkButton } from '../../ui/link-button.tsx';
import type { Column } from '../../ui/table-column.ts';
import { ArchivePreset } from './archive-preset.tsx';
import { kindWords, rigWords } from './preset-words.ts';

type PresetTableProps = {
  organisationId: string;
  rows: readonly KeptPreset[];
  sort: string;
  onSort: (word: string) => void;
  page: number;
  pageCount: number;
  onPage: (page: number) => void;
  empty: ReactNode;
  editTo: (id: string) => string;
  copyTo: (id: string) => string;
};

export function PresetTable({ organisationId, editTo, copyTo, ...table }: PresetTableProps) {
  const columns: Column<KeptPreset>[] = [
    {
      key: 'name',
      header: 'Preset',
      isSortable: true,
      isRowHeader: true,
      cell: ({ id, preset, archived }) => (
        <>
          <Link to={editTo(id)}>{preset.name}</Link>
          {archived ? <span className="font-normal text-soft"> (archived)</span> : null}
          <span className="block text-base font-normal text-soft">{stepsInWords(preset.steps)}</span>
        </>
      ),
    },
    { key: 'kind', header: 'Rig', isSortable: true, cell: ({ preset }) => rigWords[preset.kind] },
    {
      key: 'waits',
      header: 'Waits in all, s',
      isFigure: true,
      cell: ({ preset }) => leastChangeS(preset.steps),
    },
    { key: 'updatedAt', header: 'Last change', isSortable: true, cell: ({ updatedAt }) => formatDate(updatedAt) },
    {
      key: 'acts',
      header: 'Copy or archive',
      cell: (kept) => (
        <div className="flex flex-wrap gap-2">
          <LinkButton variant="quiet" to={copyTo(kept.id)} aria-label={`Copy ${kept.preset.name}`}>
            Copy
          </LinkButton>
          <ArchivePreset organisationId={organisationId} kept={kept} />
        </div>
      ),
    },
  ];
  return <DataTable caption="Rig presets" columns={columns} rowKey={({ id }) => id} {...table} />;
}

/** "mute, unplug, fit, scan, unmute, settle 8 s" */
function stepsInWords(steps: KeptPreset['preset']['steps']): string {
  return steps
    .map(({ kind, leastS }) => `${kindWords[kind].name.toLowerCase()}${leastS === 0 ? '' : ` ${leastS}\u00a0s`}`)
    .join(', ');
}
