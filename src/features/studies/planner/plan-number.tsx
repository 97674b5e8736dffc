import { useRef } from 'react';
import type { PlanWords } from '#shared/methods/method.ts';
import { formatCount, formatNumber } from '../../../lib/format.ts';
import { Notice } from '../../../ui/notice.tsx';
import { usePlan } from './plan-context.ts';
import type { Plan } from './plan-of.ts';
import type { SearchFound } from './plan-search.ts';
import { powerPercent } from './plan-words.ts';
import { PowerChart } from './power-chart.tsx';
import { PowerTable } from './power-table.tsx';
import { TakeSittings } from './take-sittings.tsx';

/** How many trials find the effect, why not fewer, and what the planned number does. */
export function PlanNumber({ plan }: { plan: Plan }) {
  const { found, isCurrent, hasFailed } = usePlan();
  const title = useRef<HTMLHeadingElement>(null);
  const words = plan.method.plan;
  if (hasFailed && !isCurrent)
    return (
      <Notice tone="amber" title="How many trials it takes could not be worked out.">
        What you typed is kept. Change a figure to try again, or reload the page once the draft is saved.
      </Notice>
    );
  if (found === null || found.own === null) return <p className="text-soft">Working out how many trials it takes …</p>;
  const { asked, own } = found;
  const [aimed] = own.power;
  return (
    <section className="flex flex-col gap-3" aria-busy={!isCurrent}>
      <h3 ref={title} tabIndex={-1} className="text-lg">
        {titleOf(own.needed)}
      </h3>
      <p>{reasonOf(asked, own.needed, words)}</p>
      <TakeSittings
        planned={asked.trials}
        needed={own.needed.nSafe}
        sessions={plan.sessions}
        does={`The ${formatNumber(asked.trials)} planned find it in ${powerPercent(aimed?.power ?? 0)} of studies`}
        isCurrent={isCurrent}
        onTaken={() => title.current?.focus()}
      />
      <PowerChart
        points={own.curve.points}
        planned={asked.trials}
        needed={own.needed}
        goal={asked.goal}
        caption={`Chance of finding ${words.atRate(asked.rate)}, by number of trials`}
      />
      <PowerTable power={own.power} words={words} />
    </section>
  );
}

type Numbers = NonNullable<SearchFound['own']>['needed'];

function titleOf({ nFirst, nSafe }: Numbers): string {
  if (nSafe === null) return 'How many trials it takes';
  return nFirst === null || nFirst === nSafe ? `Why ${nSafe}` : `Why ${nSafe} and not ${nFirst}`;
}

function reasonOf({ rate, goal }: SearchFound['asked'], { nFirst, nSafe }: Numbers, words: PlanWords): string {
  const at = words.atRate(rate);
  const above = powerPercent(goal);
  if (nFirst === null)
    return `No number of trials that was looked at finds ${at} in ${above} of studies: it is close to nothing.`;
  const first = `${formatCount(nFirst, 'trial')} find ${at} in ${above} of studies for the first time.`;
  if (nSafe === null) return `${first} From where on it stays above lies beyond what was looked at.`;
  if (nFirst === nSafe) return `${first} From there on it stays above.`;
  return `${first} More trials do not always help: the number needed jumps, and the chance of finding it saws. From ${formatNumber(nSafe)} on it stays above.`;
}
