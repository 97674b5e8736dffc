import { useMemo } from 'react';
import { formatCount } from '../../../lib/format.ts';
import type { Plan } from './plan-of.ts';
import { powerPercent } from './plan-words.ts';
import { PowerChart } from './power-chart.tsx';
import { powerCurve } from './power-curve.ts';

/** Why one number of trials serves better than the next. */
export function PlanSaw({ plan }: { plan: Plan }) {
  const { planned, plan: words } = plan.method;
  const [, drawnRate] = planned.rates;
  const { nFirst, nSafe } = useMemo(() => planned.needed(plan.alpha, drawnRate), [planned, plan.alpha, drawnRate]);
  return (
    <section className="flex flex-col gap-3">
      <h3 className="text-lg">Why more trials do not always help</h3>
      <p className="text-soft">
        The number needed jumps, so the chance of finding it saws. For {words.atRate(drawnRate)}
        {nFirst === null || nSafe === null
          ? ':'
          : ` it first reaches ${powerPercent(0.8)} at ${formatCount(nFirst, 'trial')} and stays above from ${nSafe} on.`}
      </p>
      <PowerChart points={powerCurve(plan, drawnRate)} planned={plan.trials} />
    </section>
  );
}
