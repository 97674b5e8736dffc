import { formatCount } from '../../../lib/format.ts';
import { Notice } from '../../../ui/notice.tsx';
import type { Plan } from './plan-of.ts';
import { percent, powerPercent } from './plan-words.ts';
import { trialsNeeded } from './power-curve.ts';

const smallEffect = 0.6;

/** What the plan cannot show, said before it is sealed. */
export function PlanWarnings({ plan }: { plan: Plan }) {
  const atSmall = plan.figures.power.find(({ correctRate }) => correctRate === smallEffect);
  const { nSafe } = trialsNeeded(plan, smallEffect);
  const words = plan.method.plan;
  const caution = words.caution(plan.settings);
  return (
    <div className="flex flex-col gap-4">
      {plan.listeners === 1 && plan.figures.canReachAlpha && atSmall && atSmall.power < 0.8 ? (
        <Notice tone="amber" title={`${formatCount(plan.trials, 'trial')} find only large effects.`}>
          {words.smallEffect} {percent(smallEffect)} {words.atRate}; that would be missed in{' '}
          {powerPercent(1 - atSmall.power)} of such tests. To find it in 80 %, plan{' '}
          {nSafe === null ? 'more than 5,000 trials' : formatCount(nSafe, 'trial')}. {words.notShown}
        </Notice>
      ) : null}
      {caution === null ? null : <Notice title="“No preference” is on offer.">{caution}</Notice>}
      <Notice tone="amber" title="Level is not measured here.">
        If the two cables differ in level at the load, loudness alone may explain what is found. Measure and match it
        yourself; the report will say “not recorded”.
      </Notice>
    </div>
  );
}
