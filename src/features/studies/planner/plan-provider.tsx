import { type ReactNode, useDeferredValue, useMemo, useState } from 'react';
import { useWatch } from 'react-hook-form';
import { chanceAsNumbers } from '#shared/statistics/chance.ts';
import type { StudyFormValues } from '../form/study-form-values.ts';
import type { GroupPowerAsked } from './group-power-worker.ts';
import { firstAim, type PlanAim, PlanContext, type PlanState } from './plan-context.ts';
import { type Plan, planOf, rateOf, spokenMargin } from './plan-of.ts';
import type { SearchAsked } from './plan-search.ts';
import { useGroupSimulation } from './use-group-simulation.ts';
import { usePlanSearch } from './use-plan-search.ts';

/** Keeps what the form comes to, for the fields that speak of it and for the plan beside them. */
export function PlanProvider({ children }: { children: ReactNode }) {
  const [aim, setAim] = useState(firstAim);
  const values = useDeferredValue(useWatch<StudyFormValues>());
  const plan = useMemo(() => planOf(values as Partial<StudyFormValues>), [values]);
  const shownAim = useDeferredValue(aim);
  const { found, isCurrent, hasFailed } = usePlanSearch(plan && searchOf(plan, shownAim));
  const simulated = useGroupSimulation(plan === null || plan.listeners === 1 ? null : simulationOf(plan, shownAim));
  const state = useMemo<PlanState>(
    () => ({
      aim,
      setAim: (change) => setAim((before) => ({ ...before, ...change })),
      plan,
      found,
      isCurrent,
      hasFailed,
      simulated,
    }),
    [aim, plan, found, isCurrent, hasFailed, simulated],
  );
  return <PlanContext value={state}>{children}</PlanContext>;
}

function searchOf(plan: Plan, { share, goal }: PlanAim): SearchAsked {
  return {
    method: plan.method.id,
    trials: plan.trials,
    alpha: plan.alpha,
    listeners: plan.listeners,
    rate: rateOf(plan.method, share),
    goal,
    marginPercent: spokenMargin(plan.choices),
  };
}

function simulationOf({ method, listeners, trials, alpha, alternative, choices }: Plan, aim: PlanAim): GroupPowerAsked {
  const { planned, margin } = method;
  const { right, wrong } = chanceAsNumbers(planned.guessing);
  const { marginPercent } = choices;
  const hasLimit = margin?.counts === 'trials';
  return {
    listeners,
    trials,
    labels: planned.labels,
    alpha,
    alternative,
    rates: [rateOf(method, aim.share), ...planned.rates],
    goal: aim.goal,
    guessing: hasLimit ? right : null,
    marginRate: hasLimit && marginPercent !== undefined ? right + (marginPercent / 100) * wrong : null,
  };
}
