import { createContext, useContext } from 'react';
import type { GroupPowerSoFar } from './group-power-worker.ts';
import type { Plan } from './plan-of.ts';
import type { SearchFound } from './plan-search.ts';

/** What the plan is to find. An aid for planning: it is kept while the form is open and is no part of the protocol. */
export type PlanAim = {
  /** The share of answers above guessing, or above an even split; 0 ... 1, both excluded. */
  readonly share: number;
  /** How often a study is to find it. */
  readonly goal: number;
};

/** Right seven times in ten where guessing is right in five; found in four studies of five. */
export const firstAim: PlanAim = { share: 0.4, goal: 0.8 };

export type PlanState = {
  aim: PlanAim;
  setAim: (change: Partial<PlanAim>) => void;
  /** Null while a figure that it takes is missing or out of range. */
  plan: Plan | null;
  /** The newest answer of the search; `isCurrent` where it is the one to this very plan. */
  found: SearchFound | null;
  isCurrent: boolean;
  hasFailed: boolean;
  simulated: GroupPowerSoFar | null;
};

export const PlanContext = createContext<PlanState | null>(null);

export function usePlan(): PlanState {
  const state = useContext(PlanContext);
  if (state === null) throw new Error('usePlan stands outside a PlanProvider');
  return state;
}
