import { formatCount } from '../../../lib/format.ts';
import type { Plan } from './plan-of.ts';
import { percent, powerPercent } from './plan-words.ts';
import { PowerChart } from './power-chart.tsx';
import { powerCurve, trialsNeeded } from './power-curve.ts';

const drawnRate = 0.7;

/** Why one number of trials serves better than the next. */
export function PlanSaw({ plan }: { plan: Plan }) {
  const { nFirst, nSafe } = trialsNeeded(plan, drawnRate);
  return (
    <section className="flex flex-col gap-3">
      <h3 className="text-lg">Why more trials do not always help</h3>
      <p className="text-soft">
        The number needed jumps, so the chance of finding it saws. For {percent(drawnRate)} {plan.method.plan.atRate}
        {nFirst === null || nSafe === null
          ? ':'
          : ` it first reaches ${powerPercent(0.8)} at ${formatCount(nFirst, 'trial')} and stays above from ${nSafe} on.`}
      </p>
      <PowerChart points={powerCurve(plan, drawnRate)} planned={plan.trials} />
    </section>
  );
}
