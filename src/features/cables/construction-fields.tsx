import { useFormContext, useWatch } from 'react-hook-form';
import { contradictionsOf } from '#shared/cables/contradictions.ts';
import { purityPercent } from '#shared/cables/purity.ts';
import {
  type Construction,
  conductorBuilds,
  conductorMaterials,
  geometries,
  shields,
} from '#shared/contracts/construction.ts';
import { NumberField } from '../../ui/number-field.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import { TextAreaField } from '../../ui/text-area-field.tsx';
import { TextField } from '../../ui/text-field.tsx';
import type { CableFormValues } from './cable-form-values.ts';
import { ConstructionGroup } from './construction-group.tsx';
import { soundConstruction } from './construction-values.ts';
import { buildWords, constructionLabels, geometryWords, materialWords, shieldWords } from './construction-words.ts';
import { Contradictions } from './contradictions.tsx';
import { GaugeField } from './gauge-field.tsx';

const optionsOf = <Value extends string>(values: readonly Value[], words: Record<Value, string>) =>
  values.map((value) => ({ value, label: words[value] }));

/** What the cable is made of. Everything may be left empty; what is wrong together is said, and blocks nothing. */
export function ConstructionFields() {
  const { register } = useFormContext<CableFormValues>();
  const made = soundConstruction(useWatch<CableFormValues, 'construction'>({ name: 'construction' }));
  const field = (name: keyof Construction) => ({
    label: constructionLabels[name],
    ...register(`construction.${name}`),
  });
  const notStated = 'Not stated';

  return (
    <section aria-labelledby="construction" className="flex flex-col gap-6 border-t-2 border-ink pt-5">
      <div className="flex flex-col gap-1">
        <h2 id="construction" className="text-xl">
          Construction
        </h2>
        <p className="text-soft">
          All optional. What follows from it, such as resistance and capacitance, is worked out on the cable’s page.
        </p>
      </div>
      <ConstructionGroup title="Conductor">
        <SelectField
          {...field('material')}
          placeholder={notStated}
          options={optionsOf(conductorMaterials, materialWords)}
        />
        <TextField
          {...field('nines')}
          hint={made.nines === undefined ? '4N is 99.99 %, 4N5 is 99.995 %' : `${purityPercent(made.nines)} %`}
          autoComplete="off"
        />
        <SelectField {...field('build')} placeholder={notStated} options={optionsOf(conductorBuilds, buildWords)} />
        <NumberField {...field('percentIacs')} unit="% IACS" hint="Annealed copper is 100. Empty: that of the metal." />
        <NumberField {...field('strands')} step={1} min={1} hint="In one conductor" />
        <NumberField {...field('strandDiameterMm')} unit="mm" min={0} hint="Its metal, without insulation" />
        <NumberField {...field('areaMm2')} unit="mm²" min={0} hint="Metal of one conductor" />
        <GaugeField />
        <NumberField
          {...field('conductorsPerLeg')}
          step={1}
          min={1}
          hint="Joined at both ends: 1 in a pair, 2 in a star quad"
        />
      </ConstructionGroup>
      <ConstructionGroup title="Insulation and geometry">
        <TextField {...field('insulation')} hint="Its material, such as polyethylene" autoComplete="off" />
        <NumberField {...field('permittivity')} min={1} hint="Air 1, PTFE 2.1, polyethylene 2.3, PVC 3 to 5" />
        <SelectField {...field('geometry')} placeholder={notStated} options={optionsOf(geometries, geometryWords)} />
        <NumberField
          {...field('spacingMm')}
          unit="mm"
          min={0}
          hint="Between go and return; in a star quad between opposite conductors"
        />
        <NumberField {...field('pitchMm')} unit="mm" min={0} hint="Of cable, where it is twisted" />
        <NumberField {...field('outsideMm')} unit="mm" min={0} hint="Over the sheath" />
      </ConstructionGroup>
      <ConstructionGroup title="Shield, ends and treatments">
        <SelectField {...field('shield')} placeholder={notStated} options={optionsOf(shields, shieldWords)} />
        <NumberField {...field('shieldDiameterMm')} unit="mm" min={0} hint="Over the insulation of a coaxial core" />
        <NumberField {...field('shieldAreaMm2')} unit="mm²" min={0} hint="Its metal; it is a coaxial cable’s return" />
        <TextField {...field('connectors')} autoComplete="off" />
        <div className="sm:col-span-2">
          <TextAreaField {...field('treatments')} rows={3} hint="Cold, heat, current: as the maker states them." />
        </div>
      </ConstructionGroup>
      <div role="status">
        <Contradictions found={contradictionsOf(made)} />
      </div>
    </section>
  );
}
