import type { LevelsPage } from '#shared/contracts/levels.ts';
import { levelCheckWords } from '#shared/levels/measured-levels.ts';
import { formatDateTime } from '../../lib/format.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { StatusWord } from '../../ui/status-word.tsx';

type Taken = LevelsPage['taken'][number];

const capital = (words: string) => `${words.charAt(0).toUpperCase()}${words.slice(1)}`;

export function InOrOut({ isIn }: { isIn: boolean | null }) {
  if (isIn === null) return <StatusWord tone="amber">not measured</StatusWord>;
  return <StatusWord tone={isIn ? 'held' : 'amber'}>{isIn ? 'in' : 'out'}</StatusWord>;
}

/** Every measurement so far: in or out, when, and by whom. */
export function LevelsTaken({ taken }: { taken: readonly Taken[] }) {
  const numbered = taken.map((one, index) => ({ ...one, key: `${index}` }));
  return (
    <DataTable
      caption="Measurements"
      columns={[
        { key: 'check', header: 'When', isRowHeader: true, cell: ({ check }) => capital(levelCheckWords[check]) },
        { key: 'isIn', header: 'Levels', cell: ({ isIn }) => <InOrOut isIn={isIn} /> },
        { key: 'at', header: 'Recorded', cell: ({ at }) => formatDateTime(at) },
        { key: 'by', header: 'By', cell: ({ by }) => by ?? 'nobody' },
      ]}
      rows={numbered}
      rowKey={({ key }) => key}
      empty={<p className="text-soft">Nothing is measured yet.</p>}
    />
  );
}
