import { useFormContext } from 'react-hook-form';
import { Button } from '../../../ui/button.tsx';
import { NumberField } from '../../../ui/number-field.tsx';
import { TextField } from '../../../ui/text-field.tsx';
import type { StudyFormValues } from './study-form-values.ts';

type ExcerptRowProps = { index: number; count: number; onMove: (to: number) => void; onRemove: () => void };

export function ExcerptRow({ index, count, onMove, onRemove }: ExcerptRowProps) {
  const { register } = useFormContext<StudyFormValues>();
  const name = `excerpt ${index + 1}`;
  return (
    <li data-row={index} className="flex flex-col gap-3 border-b border-rule pb-4">
      <div className="grid grid-cols-2 gap-4 sm:grid-cols-[minmax(0,1fr)_6.5rem_8rem]">
        <TextField
          {...register(`programme.${index}.title`)}
          label={`Excerpt ${index + 1}`}
          autoComplete="off"
          className="col-span-2 sm:col-span-1"
        />
        <TextField {...register(`programme.${index}.start`)} label="Starts at" autoComplete="off" />
        <NumberField
          {...register(`programme.${index}.lengthS`, { valueAsNumber: true })}
          label="Length"
          unit="s"
          step={1}
          min={2}
          max={120}
        />
      </div>
      {count > 1 ? (
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
          <Button variant="quiet" onClick={onRemove} aria-label={`Remove ${name}`}>
            Remove
          </Button>
        </div>
      ) : null}
    </li>
  );
}
