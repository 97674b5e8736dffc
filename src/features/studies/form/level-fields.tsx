import { useController } from 'react-hook-form';
import { hertzText } from '#shared/levels/level-words.ts';
import {
  gainHz,
  type RegisteredLevels,
  usualFrequencies,
  usualToleranceMilliDb,
} from '#shared/levels/registered-levels.ts';
import { CheckboxField } from '../../../ui/checkbox-field.tsx';
import { NumberField } from '../../../ui/number-field.tsx';
import { RadioGroupField } from '../../../ui/radio-group-field.tsx';
import { FormSection } from './form-section.tsx';
import type { StudyFormValues } from './study-form-values.ts';

const options = [
  {
    value: 'none',
    label: 'Not measured',
    hint: 'The finding says that level was not recorded, and that loudness may explain it.',
  },
  {
    value: 'as-supplied',
    label: 'As supplied',
    hint: 'The cables as they are. A difference in level is part of the product, and the finding names it.',
  },
  {
    value: 'level-compensated',
    label: 'Level-compensated',
    hint: 'Trimmed for each cable until they match. Beyond 0.2 dB no session starts.',
  },
];

const usual = (handling: RegisteredLevels['handling']): RegisteredLevels => ({
  handling,
  toleranceMilliDb: usualToleranceMilliDb,
  frequenciesHz: [gainHz],
});

/** Whether level at the load is measured, and what is done about it: the first suspect of every comparison. */
export function LevelFields() {
  const { field, fieldState } = useController<StudyFormValues, 'levels'>({ name: 'levels' });
  const levels = field.value;
  const change = (part: Partial<RegisteredLevels>) => {
    if (levels !== undefined) field.onChange({ ...levels, ...part });
  };
  const choose = (value: string) =>
    field.onChange(value === 'none' ? undefined : { ...(levels ?? usual('as-supplied')), handling: value });
  const faults = fieldState.error as { toleranceMilliDb?: { message?: string } } | undefined;
  return (
    <FormSection
      title="Level at the load"
      lede="Level is the first suspect: 0.1 dB is the usual strict figure. It is measured by blind code before, at half time and after, by somebody who runs no session."
    >
      <RadioGroupField
        label="How level is handled"
        name="level-handling"
        value={levels?.handling ?? 'none'}
        options={options}
        onChange={(event) => choose(event.target.value)}
      />
      {levels === undefined ? null : (
        <>
          <NumberField
            label="Tolerance"
            unit="dB"
            step="any"
            min={0.01}
            max={0.2}
            value={Number.isFinite(levels.toleranceMilliDb) ? levels.toleranceMilliDb / 1000 : ''}
            onChange={(event) =>
              change({
                toleranceMilliDb:
                  event.target.value === '' ? Number.NaN : Math.round(Number(event.target.value) * 1000),
              })
            }
            error={faults?.toleranceMilliDb?.message}
            hint="Between any two codes at 1 kHz. The target is 0.05 dB; 0.1 dB counts as matched."
          />
          <fieldset className="flex flex-col gap-1">
            <legend className="font-semibold">Measured at</legend>
            <p className="text-soft">1 kHz shows gain; the others show response, relative to it.</p>
            <div className="grid grid-cols-2 gap-x-4 sm:grid-cols-4">
              {usualFrequencies.map((hz) => (
                <CheckboxField
                  key={hz}
                  label={hertzText(hz)}
                  disabled={hz === gainHz}
                  checked={levels.frequenciesHz.includes(hz)}
                  onChange={(event) =>
                    change({
                      frequenciesHz: event.target.checked
                        ? [...levels.frequenciesHz, hz].sort((a, b) => a - b)
                        : levels.frequenciesHz.filter((other) => other !== hz),
                    })
                  }
                />
              ))}
            </div>
          </fieldset>
        </>
      )}
    </FormSection>
  );
}
