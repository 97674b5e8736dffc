import type { ChangeStep } from '../contracts/proctor-live.ts';
import { cautions } from '../contracts/proctor-live.ts';
import type { PresetStep } from '../protocol/rig-preset.ts';
import { plainSteps } from '../protocol/shipped-presets.ts';
import type { SessionPlan } from './events.ts';
import type { OpenTrial } from './state.ts';

// The steps of a change as a session's plan fixes them.

/** The steps in their order; five without waits where the plan names no preset. */
export const stepsOf = ({ rig, rigPreset }: SessionPlan): readonly PresetStep[] => rigPreset?.steps ?? plainSteps(rig);

export const stepKindsOf = (plan: SessionPlan): ChangeStep[] => stepsOf(plan).map(({ kind }) => kind);

/** Whether labels are scanned at every change, and gone through once more at the end. */
export const scansOf = (plan: SessionPlan): boolean => stepKindsOf(plan).includes('scan');

/** What must be read and ticked before seating opens. */
export const cautionsOf = ({ rigPreset }: SessionPlan) =>
  cautions.filter((one) => rigPreset?.cautions.includes(one) ?? true);

/** The step at hand, or null outside a change. */
function stepAtHand(trial: OpenTrial, plan: SessionPlan): PresetStep | null {
  return trial.stage === 'change' ? (stepsOf(plan)[trial.stepsDone.length] ?? null) : null;
}

/** The step to be confirmed now, or null outside a change. */
export const nextStep = (trial: OpenTrial, plan: SessionPlan): ChangeStep | null =>
  stepAtHand(trial, plan)?.kind ?? null;

/** Whether the step at hand is the one that starts listening. */
export const isLastStep = (trial: OpenTrial, plan: SessionPlan): boolean =>
  trial.stage === 'change' && trial.stepsDone.length === stepsOf(plan).length - 1;

/** From when the step at hand may be confirmed: its least wait counts from the step before. Null outside a change. */
export function stepEndsAt(trial: OpenTrial, plan: SessionPlan): number | null {
  const step = stepAtHand(trial, plan);
  return step === null ? null : trial.readyAt + step.leastS * 1000;
}

/** When the change can be over at the earliest, if every step still to come lasts no longer than it must. */
export function couldBeReadyAt(trial: OpenTrial, plan: SessionPlan, now: number): number {
  const waits = stepsOf(plan)
    .slice(trial.stepsDone.length + 1)
    .reduce((sum, { leastS }) => sum + leastS * 1000, 0);
  const stepEnds = stepEndsAt(trial, plan) ?? trial.readyAt;
  return (isLastStep(trial, plan) ? stepEnds : Math.max(now, stepEnds)) + waits;
}
