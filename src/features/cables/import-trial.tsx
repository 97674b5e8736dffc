import type { CableImport } from '#shared/contracts/cables.ts';
import { formatCount } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';

type ImportTrialProps = { found: CableImport; isAdding: boolean; onAdd: () => void };

/** What a table would add, or every line of it that cannot be read. */
export function ImportTrial({ found, isAdding, onAdd }: ImportTrialProps) {
  const { cables, first, known, faults, faultCount } = found;
  if (faultCount > 0)
    return (
      <Notice tone="amber" title={`${formatCount(faultCount, 'fault')}; nothing was added.`}>
        Mend them in the table and choose it again.
        <ul className="pt-1">
          {faults.map(({ line, column, detail }) => (
            <li key={`${line} ${column} ${detail}`}>
              Line {line}, <span className="font-mono">{column}</span>: {detail}
            </li>
          ))}
          {faultCount > faults.length ? <li>and {faultCount - faults.length} more</li> : null}
        </ul>
      </Notice>
    );
  return (
    <div className="flex flex-col items-start gap-4">
      <p className="text-lg">
        {formatCount(cables, 'cable')} would be added: {first.join(', ')}
        {cables > first.length ? ' …' : ''}
      </p>
      {known > 0 ? (
        <Notice tone="amber" title={`${formatCount(known, 'name')} of them you have already.`}>
          They would stand in the list twice.
        </Notice>
      ) : null}
      <Button variant="primary" busy={isAdding} busyLabel="Adding" onClick={onAdd}>
        Add {formatCount(cables, 'cable')}
      </Button>
    </div>
  );
}
