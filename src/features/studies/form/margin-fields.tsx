import { useController, useWatch } from 'react-hook-form';
import type { MarginOffer } from '#shared/methods/method.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { formatCount } from '../../../lib/format.ts';
import { NumberField } from '../../../ui/number-field.tsx';
import { SelectField } from '../../../ui/select-field.tsx';
import { usePlan } from '../planner/plan-context.ts';
import { exampleMargin } from '../planner/plan-of.ts';
import type { SearchFound } from '../planner/plan-search.ts';
import type { StudyFormValues } from './study-form-values.ts';

const label = 'If nobody hears it, I want to be able to say so';

/** Whether finding nothing is to say something, and how little it then has to be. */
export function MarginFields() {
  const { field } = useController<StudyFormValues, 'marginPercent'>({ name: 'marginPercent' });
  const { margin, name } = methodOf(useWatch<StudyFormValues, 'method'>({ name: 'method' }));
  const { plan, found } = usePlan();
  const isAsked = field.value !== undefined;
  if (margin === null)
    return (
      <SelectField
        label={label}
        disabled
        value="no"
        options={[{ value: 'no', label: 'no, only look for a difference' }]}
        hint={`${name} has no scale on which a study could register how little is next to nothing. ABX, duo-trio and triangle have.`}
      />
    );
  const isGroup = (plan?.listeners ?? 1) > 1;
  const takes = takesWords(margin, found, isGroup, field.value ?? exampleMargin);
  return (
    <div className="flex flex-col gap-3">
      <SelectField
        label={label}
        value={isAsked ? 'yes' : 'no'}
        onChange={(event) => field.onChange(event.target.value === 'yes' ? exampleMargin : undefined)}
        options={[
          {
            value: 'no',
            label: `no, only look for ${margin.counts === 'listeners' ? 'a preference' : 'a difference'}`,
          },
          { value: 'yes', label: 'yes, within a margin' },
        ]}
        hint={isAsked ? undefined : `To show ${margin.shows(exampleMargin)}${takes}`}
      />
      {isAsked ? (
        <NumberField
          ref={field.ref}
          name={field.name}
          onBlur={field.onBlur}
          value={Number.isFinite(field.value) ? field.value : ''}
          onChange={(event) => field.onChange(event.target.value === '' ? Number.NaN : Number(event.target.value))}
          label={margin.label}
          unit="%"
          step={1}
          min={1}
          max={margin.mostPercent}
          hint={
            Number.isFinite(field.value)
              ? `The study may then say ${margin.shows(field.value ?? exampleMargin)}. That${takes}`
              : undefined
          }
        />
      ) : null}
    </div>
  );
}

/** " would take 227 trials." with what the first number means where it is another one. */
function takesWords({ counts }: MarginOffer, found: SearchFound | null, isGroup: boolean, percent: number): string {
  const count = (number: number) =>
    counts === 'trials' ? formatCount(number, 'trial') : formatCount(number, 'person', 'people');
  if (counts === 'trials' && isGroup)
    return ' takes as many trials as the simulation beside shows to be enough: a group has no fixed number.';
  if (found === null || found.marginNeeded === null || found.asked.marginPercent !== percent) return ' takes …';
  const { nFirst, nSafe } = found.marginNeeded;
  if (nSafe === null) return ` takes more than ${count(20_000)}.`;
  const first = nFirst === null || nFirst === nSafe ? '' : ` (${nFirst} reach 90\u00a0% for the first time)`;
  return ` would take ${count(nSafe)}, to come out in 90\u00a0% of studies where there is nothing${first}.`;
}
