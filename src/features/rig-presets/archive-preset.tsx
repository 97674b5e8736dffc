import type { KeptPreset } from '#shared/contracts/rig-presets.ts';
import { problemText } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { useToast } from '../../ui/toast.tsx';
import { useArchivePreset } from './rig-presets.queries.ts';

/** Nothing ends by it: studies keep what they chose, and it can be brought back. */
export function ArchivePreset({ organisationId, kept }: { organisationId: string; kept: KeptPreset }) {
  const archive = useArchivePreset(organisationId, kept.id);
  const showToast = useToast();
  const { archived, preset } = kept;
  const set = () =>
    archive.mutate(!archived, {
      onSuccess: () =>
        showToast(archived ? `${preset.name} can be chosen again.` : `${preset.name} is archived.`, 'held'),
      onError: (error) => showToast(problemText(error), 'amber'),
    });
  return (
    <Button
      variant="quiet"
      busy={archive.isPending}
      busyLabel="Saving"
      onClick={set}
      aria-label={`${archived ? 'Bring back' : 'Archive'} ${preset.name}`}
    >
      {archived ? 'Bring back' : 'Archive'}
    </Button>
  );
}
