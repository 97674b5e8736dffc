import { type FormEvent, useState } from 'react';
import type { LevelsPage } from '#shared/contracts/levels.ts';
import type { Member } from '#shared/contracts/users.ts';
import { problemOf } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import { useToast } from '../../ui/toast.tsx';
import { useAssignMeasurer } from './levels.queries.ts';

type MeasurerChoiceProps = { organisationId: string; page: LevelsPage; members: readonly Member[] };

/** Who measures. Whoever it is sees levels by code, so it is nobody who runs a session of the study. */
export function MeasurerChoice({ organisationId, page, members }: MeasurerChoiceProps) {
  const [userId, setUserId] = useState(page.measurer?.id ?? '');
  const [fault, setFault] = useState<string>();
  const assign = useAssignMeasurer(organisationId, page.sessionId);
  const showToast = useToast();

  async function send(event: FormEvent) {
    event.preventDefault();
    setFault(undefined);
    try {
      await assign.mutateAsync(userId);
      showToast('Named.', 'held');
    } catch (error) {
      const problem = problemOf(error);
      setFault(problem.errors[0]?.detail ?? problem.message);
    }
  }

  return (
    <form onSubmit={send} aria-label="Who measures" className="flex max-w-xl flex-wrap items-end gap-4">
      <SelectField
        className="min-w-60 flex-1"
        label="Who measures"
        value={userId}
        onChange={(event) => setUserId(event.target.value)}
        placeholder="Nobody is named"
        options={members.map(({ id, name }) => ({ value: id, label: name }))}
        error={fault}
      />
      <Button type="submit" disabled={userId === '' || userId === page.measurer?.id} busy={assign.isPending}>
        Name them
      </Button>
    </form>
  );
}
