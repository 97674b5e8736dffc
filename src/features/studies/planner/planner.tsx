import { Notice } from '../../../ui/notice.tsx';
import { GroupPower } from './group-power.tsx';
import { usePlan } from './plan-context.ts';
import { PlanCounts } from './plan-counts.tsx';
import { PlanFigures } from './plan-figures.tsx';
import { PlanHeadline } from './plan-headline.tsx';
import { PlanNull } from './plan-null.tsx';
import { PlanNumber } from './plan-number.tsx';
import { PlanWarnings } from './plan-warnings.tsx';

/** What the study needs and what it can show, live as it is typed; words first. */
export function Planner() {
  const { plan } = usePlan();
  return (
    <aside
      // biome-ignore lint/a11y/noNoninteractiveTabindex: where it scrolls beside the form, it must be reached by key
      tabIndex={0}
      aria-label="What this plan comes to"
      className="flex min-w-0 flex-col gap-6 lg:sticky lg:top-6 lg:-mx-2 lg:max-h-[calc(100dvh-3rem)] lg:overflow-y-auto lg:px-2 lg:pb-6"
    >
      {plan ? (
        <>
          <PlanHeadline plan={plan} />
          <PlanFigures plan={plan} />
          {plan.listeners === 1 ? <PlanNumber plan={plan} /> : <GroupPower plan={plan} />}
          <PlanWarnings plan={plan} />
          <PlanNull plan={plan} />
          <PlanCounts plan={plan} />
        </>
      ) : (
        <Notice title="The plan appears here.">
          It needs whole numbers for sessions, listeners, trials, change and answer window, a significance level, and
          the length of every excerpt.
        </Notice>
      )}
    </aside>
  );
}
