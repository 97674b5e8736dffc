import { useMemo } from 'react';
import { formatCount } from '../../../lib/format.ts';
import { Notice } from '../../../ui/notice.tsx';
import type { Plan } from './plan-of.ts';
import { powerPercent } from './plan-words.ts';

/** What the plan cannot show, said before it is sealed. */
export function PlanWarnings({ plan }: { plan: Plan }) {
  const { planned, plan: words } = plan.method;
  const [smallEffect] = planned.rates;
  const [atSmall] = plan.figures.power;
  const { nSafe } = useMemo(() => planned.needed(plan.alpha, smallEffect), [planned, plan.alpha, smallEffect]);
  const caution = words.caution(plan.choices);
  return (
    <div className="flex flex-col gap-4">
      {plan.listeners === 1 && plan.figures.canReachAlpha && atSmall && atSmall.power < 0.8 ? (
        <Notice tone="amber" title={`${formatCount(plan.trials, 'trial')} find only large effects.`}>
          {words.smallEffect} {words.atRate(smallEffect)}; that would be missed in {powerPercent(1 - atSmall.power)} of
          such tests. To find it in 80 %, plan{' '}
          {nSafe === null ? `more than ${formatCount(planned.searchedTo, 'trial')}` : formatCount(nSafe, 'trial')}.{' '}
          {words.notShown}
        </Notice>
      ) : null}
      {caution === null ? null : <Notice title={caution.title}>{caution.words}</Notice>}
      <Notice tone="amber" title="Level is not measured here.">
        If the two cables differ in level at the load, loudness alone may explain what is found. Measure and match it
        yourself; the report will say “not recorded”.
      </Notice>
    </div>
  );
}
