import { useEffect } from 'react';
import { useFormContext, useWatch } from 'react-hook-form';
import { Link } from 'react-router-dom';
import type { KeptPreset } from '#shared/contracts/rig-presets.ts';
import { leastChangeS, type RigPreset } from '#shared/protocol/rig-preset.ts';
import { SelectField } from '../../../ui/select-field.tsx';
import { rigWords } from '../study-words.ts';
import { presetFor, type StudyFormValues } from './study-form-values.ts';

type RigChoiceProps = { presets: readonly KeptPreset[]; presetsTo: string };

const asChosen = 'as-chosen';
const isSame = (one: RigPreset, other: RigPreset) => JSON.stringify(one) === JSON.stringify(other);

/** How a change is made: one of the organisation's presets, or what the draft has taken before. */
export function RigChoice({ presets, presetsTo }: RigChoiceProps) {
  const { setValue, formState } = useFormContext<StudyFormValues>();
  const rig = useWatch<StudyFormValues, 'rig'>({ name: 'rig' });
  const preset = useWatch<StudyFormValues, 'rigPreset'>({ name: 'rigPreset' });
  const chosen = preset === undefined ? undefined : presets.find((kept) => isSame(kept.preset, preset));
  const isOther = preset !== undefined && preset.kind !== rig;

  // Choosing a cable of another kind chooses its rig.
  useEffect(() => {
    if (isOther) setValue('rigPreset', presetFor(presets, rig), { shouldDirty: true });
  }, [isOther, rig, presets, setValue]);

  function choose(id: string) {
    const next = presets.find((kept) => kept.id === id)?.preset;
    if (next === undefined) return;
    setValue('rigPreset', next, { shouldDirty: true });
    setValue('rig', next.kind, { shouldDirty: true, shouldValidate: formState.isSubmitted });
  }

  const before =
    preset === undefined ? `${rigWords[rig]}, five plain steps without waits` : `${preset.name}, as it was when chosen`;
  return (
    <div className="flex flex-col gap-2">
      <SelectField
        name="rigPreset"
        label="Rig"
        value={chosen?.id ?? asChosen}
        onChange={({ target }) => choose(target.value)}
        options={[
          ...(chosen === undefined ? [{ value: asChosen, label: before }] : []),
          ...presets.map((kept) => ({ value: kept.id, label: kept.preset.name })),
        ]}
        hint="Decides the steps of a change, their least waits, and the cautions that the proctor ticks."
      />
      {preset === undefined ? null : <StepsInBrief preset={preset} />}
      <p className="text-soft">
        Other steps? Copy or change one under <Link to={presetsTo}>rig presets</Link>.
      </p>
    </div>
  );
}

function StepsInBrief({ preset }: { preset: RigPreset }) {
  const steps = preset.steps.map(({ act, leastS }) => {
    const words = act.replaceAll(' {code}', '').toLowerCase();
    return leastS === 0 ? words : `${words} (at least ${leastS}\u00a0s)`;
  });
  const least = leastChangeS(preset.steps);
  return (
    <p>
      {steps.join(' → ')}
      {least === 0 ? '.' : `. The waits come to ${least}\u00a0s; a change cannot be shorter.`}
    </p>
  );
}
