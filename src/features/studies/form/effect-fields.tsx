import { useMemo, useState } from 'react';
import { useWatch } from 'react-hook-form';
import type { Method } from '#shared/methods/method.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { dPrimeAt } from '#shared/statistics/psychometric.ts';
import { NumberField } from '../../../ui/number-field.tsx';
import { SliderField } from '../../../ui/slider-field.tsx';
import { usePlan } from '../planner/plan-context.ts';
import { rateOf } from '../planner/plan-of.ts';
import { type EffectScale, effectScales, scaleFace, scaleFault, typedShare } from './effect-scales.ts';
import type { StudyFormValues } from './study-form-values.ts';

/** What is to be found, on every scale of the method; whichever is typed, the others follow. */
export function EffectFields() {
  const method = methodOf(useWatch<StudyFormValues, 'method'>({ name: 'method' }));
  return <Effect key={method.id} method={method} />;
}

function Effect({ method }: { method: Method }) {
  const { aim, setAim } = usePlan();
  const [typed, setTyped] = useState<{ key: EffectScale['key']; text: string } | null>(null);
  const scales = useMemo(() => effectScales(method), [method]);
  const faces = useMemo(() => scales.map((scale) => scaleFace(scale, aim.share)), [scales, aim.share]);
  const meaning = useMemo(() => meaningOf(method, aim.share, faces), [method, aim.share, faces]);
  const [rate] = scales;
  if (rate === undefined) return null;
  const rateNow = rate.ofShare(aim.share);

  function type(scale: EffectScale, text: string) {
    setTyped({ key: scale.key, text });
    const share = typedShare(scale, text);
    if (share !== null) setAim({ share });
  }

  return (
    <fieldset className="flex min-w-0 flex-col gap-2">
      <legend className="mb-1 font-semibold">{method.plan.aim.label}</legend>
      <SliderField
        aria-label={method.plan.aim.label}
        min={Math.floor(rate.ofShare(0)) + 1}
        max={99}
        step={1}
        value={Math.round(rateNow)}
        valueText={method.plan.atRate(rateNow / 100)}
        onChange={(event) => {
          setTyped(null);
          setAim({ share: rate.toShare(Number(event.target.value)) });
        }}
      />
      <div className="grid grid-cols-3 items-start gap-x-4 max-sm:gap-x-3">
        {scales.map((scale, index) => {
          const text = typed?.key === scale.key ? typed.text : faces[index];
          const isSound = typed?.key !== scale.key || typedShare(scale, typed.text) !== null;
          return (
            <NumberField
              key={scale.key}
              label={scale.label}
              unit={scale.unit}
              value={text}
              error={isSound ? undefined : scaleFault(scale)}
              onChange={(event) => type(scale, event.target.value)}
              onBlur={() => isSound && setTyped(null)}
            />
          );
        })}
      </div>
      <p className="text-soft">{meaning}</p>
    </fieldset>
  );
}

/** The same in words; d′ by the first rule is on its field already, and takes a while to find. */
function meaningOf(method: Method, share: number, [, heard, first]: readonly string[]): string {
  const rate = rateOf(method, share);
  if (heard === undefined) return 'The share of answers that prefer the same cable; without a preference it is half.';
  const readings = method.sensitivity.map(({ psychometric, words }, index) => {
    const dPrime = index === 0 ? Number(first) : dPrimeAt(psychometric, rate);
    return `${dPrime.toFixed(2)} ${words}`;
  });
  return `That is ${method.plan.atRate(rate)}, as when the difference is heard in ${heard}\u00a0% of trials and the rest is guessed. d′ is how far apart the two cables are heard, in units of how much one of them varies from time to time: ${readings.join(', ')}.`;
}
