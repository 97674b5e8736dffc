import { type ReactNode, useState } from 'react';
import { useFormContext } from 'react-hook-form';
import { formatCount } from '../../../lib/format.ts';
import { Button } from '../../../ui/button.tsx';
import type { StudyFormValues } from '../form/study-form-values.ts';
import { mostTrialsInAll, type Sittings, splitTrials } from './split-trials.ts';

type TakeSittingsProps = {
  /** Over all sessions. */
  planned: number;
  /** From how many trials on they are enough; null where that is not known. */
  needed: number | null;
  sessions: number;
  /** "The 16 planned find it in 45 % of studies" */
  does: ReactNode;
  isCurrent: boolean;
  /** The button is gone once it was pressed; the focus has to go somewhere. */
  onTaken: () => void;
};

/** The planned number of trials beside the one that is needed, and the button that takes that one over. */
export function TakeSittings({ planned, needed, sessions, does, isCurrent, onTaken }: TakeSittingsProps) {
  const { setValue } = useFormContext<StudyFormValues>();
  const [taken, setTaken] = useState('');
  const split = needed === null || planned >= needed ? null : splitTrials(needed, { sessions });

  function take(next: Sittings) {
    setValue('sessions', next.sessions, { shouldDirty: true, shouldValidate: true });
    setValue('trials', next.trials, { shouldDirty: true, shouldValidate: true });
    setTaken(`Planned: ${sittingsWords(next)}.`);
    onTaken();
  }

  return (
    <div className="flex flex-wrap items-center gap-x-5 gap-y-2">
      <p>
        {does}
        {verdictOf(planned, needed, split)}
      </p>
      {split === null ? null : (
        <Button disabled={!isCurrent} onClick={() => take(split)}>
          Plan {sittingsWords(split)}
        </Button>
      )}
      <p role="status" className="sr-only">
        {taken}
      </p>
    </div>
  );
}

function verdictOf(planned: number, needed: number | null, split: Sittings | null): string {
  if (needed === null) return '.';
  if (planned >= needed) return ', and are enough.';
  if (split !== null) return ', and are too few.';
  return `. A study can hold ${formatCount(mostTrialsInAll, 'trial')} at most: look for a larger effect, or plan several studies.`;
}

const sittingsWords = ({ sessions, trials }: Sittings) =>
  `${formatCount(sessions, 'session')} of ${formatCount(trials, 'trial')}`;
