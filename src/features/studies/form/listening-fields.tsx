import { useFormContext } from 'react-hook-form';
import { NumberField } from '../../../ui/number-field.tsx';
import { TextField } from '../../../ui/text-field.tsx';
import { AlphaField } from './alpha-field.tsx';
import { BreakFields } from './break-fields.tsx';
import { EffectFields } from './effect-fields.tsx';
import { FormSection } from './form-section.tsx';
import { GoalField } from './goal-field.tsx';
import { MarginFields } from './margin-fields.tsx';
import type { StudyFormValues } from './study-form-values.ts';

const number = { valueAsNumber: true } as const;

export function ListeningFields() {
  const { register } = useFormContext<StudyFormValues>();
  return (
    <FormSection title="How much listening" lede="Change any of these and the plan follows.">
      <EffectFields />
      <div className="grid gap-x-4 gap-y-6 sm:grid-cols-2">
        <GoalField />
        <AlphaField />
        <NumberField {...register('sessions', number)} label="Sessions" step={1} min={1} max={20} />
        <NumberField
          {...register('listenersPerSession', number)}
          label="Listeners per session"
          step={1}
          min={1}
          max={24}
        />
        <NumberField {...register('trials', number)} label="Trials per session" step={1} min={5} max={60} />
        <NumberField
          {...register('spares', number)}
          label="Spares per session"
          step={1}
          min={0}
          max={10}
          hint="Drawn beforehand; one takes the place of a trial that is set aside for a stated fault."
        />
      </div>
      <BreakFields />
      <MarginFields />
      <TextField
        {...register('samplingFrame')}
        label="Whom are the listeners drawn from?"
        optional
        hint="Such as “members of a listening club, invited by lot”. Only with it, and from six listeners on, may a finding speak of listeners in general."
      />
    </FormSection>
  );
}
