import { useFormContext, useWatch } from 'react-hook-form';
import { leastChangeS, type RigPreset } from '#shared/protocol/rig-preset.ts';
import { Button } from '../../ui/button.tsx';
import { NumberField } from '../../ui/number-field.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { kindWords } from './preset-words.ts';

type StepRowProps = { index: number; count: number; onMove: (to: number) => void; onRemove: () => void };

/** One step of the change: what it is called here, and how long it lasts at least. */
export function StepRow({ index, count, onMove, onRemove }: StepRowProps) {
  const { register } = useFormContext<RigPreset>();
  const kind = useWatch<RigPreset, `steps.${number}.kind`>({ name: `steps.${index}.kind` });
  const { name, meaning } = kindWords[kind];
  const field = <F extends 'act' | 'how' | 'done' | 'leastS'>(part: F) => `steps.${index}.${part}` as const;
  return (
    <li data-row={index} className="flex flex-col gap-3 border-b border-rule pb-4">
      <div>
        <h3 className="text-lg">
          {index + 1}. {name}
        </h3>
        <p className="text-soft">{meaning}</p>
      </div>
      <div className="grid gap-4 sm:grid-cols-[minmax(0,1fr)_minmax(0,1fr)_7rem]">
        <TextField {...register(field('act'))} label="What to do" autoComplete="off" />
        <TextField {...register(field('done'))} label="The button once done" autoComplete="off" />
        <NumberField
          {...register(field('leastS'), { valueAsNumber: true })}
          label="Least wait"
          unit="s"
          step={1}
          min={0}
          max={120}
        />
        <TextField {...register(field('how'))} label="How" autoComplete="off" className="sm:col-span-3" />
      </div>
      <div className="-ml-4 flex flex-wrap">
        <Button
          variant="quiet"
          data-act={`up-${index}`}
          disabled={index === 0}
          onClick={() => onMove(index - 1)}
          aria-label={`Move ${name} up`}
        >
          Move up
        </Button>
        <Button
          variant="quiet"
          data-act={`down-${index}`}
          disabled={index === count - 1}
          onClick={() => onMove(index + 1)}
          aria-label={`Move ${name} down`}
        >
          Move down
        </Button>
        {kind === 'unplug' || kind === 'fit' ? null : (
          <Button variant="quiet" onClick={onRemove} aria-label={`Remove ${name}`}>
            Remove
          </Button>
        )}
      </div>
    </li>
  );
}

/** What the waits come to, as they are typed. */
export function WaitsInAll() {
  const steps = useWatch<RigPreset, 'steps'>({ name: 'steps' });
  const least = leastChangeS(steps.map(({ leastS }) => ({ leastS: Number.isFinite(leastS) ? leastS : 0 })));
  return (
    <p role="status" className="text-soft">
      The waits come to {least}&nbsp;s. No study can register a change shorter than that; leave time for the hands.
    </p>
  );
}
