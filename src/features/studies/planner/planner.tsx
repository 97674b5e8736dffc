import { useDeferredValue } from 'react';
import { useWatch } from 'react-hook-form';
import { Notice } from '../../../ui/notice.tsx';
import type { StudyFormValues } from '../form/study-form-values.ts';
import { PlanFigures } from './plan-figures.tsx';
import { PlanHeadline } from './plan-headline.tsx';
import { planOf } from './plan-of.ts';
import { PlanPower } from './plan-power.tsx';
import { PlanSaw } from './plan-saw.tsx';
import { PlanWarnings } from './plan-warnings.tsx';

/** What the study needs and what it can show, live as it is typed; words first. */
export function Planner() {
  const values = useDeferredValue(useWatch<StudyFormValues>());
  const plan = planOf(values as Partial<StudyFormValues>);
  return (
    <aside aria-label="What this plan comes to" className="flex min-w-0 flex-col gap-5 lg:sticky lg:top-6">
      {plan ? (
        <>
          <PlanHeadline plan={plan} />
          <PlanFigures plan={plan} />
          <PlanPower plan={plan} />
          <PlanWarnings plan={plan} />
          {plan.listeners === 1 ? <PlanSaw plan={plan} /> : null}
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
