import { useState } from 'react';
import { useFormContext, useWatch } from 'react-hook-form';
import { areaOfDiameter, diameterOfArea, diameterOfGauge, gaugeOfDiameter } from '#shared/cables/wire-gauge.ts';
import { NumberField } from '../../ui/number-field.tsx';
import type { CableFormValues } from './cable-form-values.ts';

const squareMillimetre = 1e-6;

/** The cross-section as an American wire gauge: either of the two fields sets the other. */
export function GaugeField() {
  const { setValue } = useFormContext<CableFormValues>();
  const areaMm2 = useWatch<CableFormValues, 'construction.areaMm2'>({ name: 'construction.areaMm2' });
  const [typed, setTyped] = useState<string | null>(null);

  function take(gauge: string) {
    setTyped(gauge);
    const value = Number(gauge);
    if (gauge.trim() === '' || !(value >= -3 && value <= 60)) return;
    const area = areaOfDiameter(diameterOfGauge(value)) / squareMillimetre;
    setValue('construction.areaMm2', String(Number(area.toPrecision(4))), { shouldDirty: true, shouldValidate: true });
  }

  return (
    <NumberField
      label="The same as a wire gauge"
      unit="AWG"
      optional
      hint="-3 (0000) to 60. Either field sets the other."
      value={typed ?? gaugeOf(areaMm2)}
      onChange={(event) => take(event.target.value)}
      onBlur={() => setTyped(null)}
    />
  );
}

/** To a tenth of a gauge, half of what a strand more or less makes; nothing for what is no cross-section. */
function gaugeOf(areaMm2: string): string {
  const area = Number(areaMm2);
  if (areaMm2.trim() === '' || !(area > 0 && area <= 1000)) return '';
  return String(Number(gaugeOfDiameter(diameterOfArea(area * squareMillimetre)).toFixed(1)));
}
