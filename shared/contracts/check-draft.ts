import { z } from 'zod';
import type { MethodChoices } from '../methods/method.ts';
import { type MethodId, methods } from '../methods/methods.ts';
import { leastSeparate, type WaysToRun } from '../protocol/ways-to-run.ts';
import { checkTrialsIn, mostSteps } from '../session/trial-kinds.ts';

const whole = (least: number, most: number, what: string) =>
  z.int(`Enter ${what} as a whole number`).min(least, `At least ${least}`).max(most, `At most ${most}`);

/** A step of a known difference: the check cable that makes it, its measured size, and its trials in each session. */
export const checkStepDraft = z.strictObject({
  /** In thousandths of a decibel: 500 is 0.5 dB. */
  milliDb: z.int('Enter the measured difference').min(10, 'At least 0.01 dB').max(20_000, 'At most 20 dB'),
  cableId: z.uuid('Choose a check cable'),
  specimenIds: z.array(z.uuid()).min(1, 'Choose at least one specimen').max(6, 'At most 6 specimens'),
  trials: whole(1, 30, 'trials'),
});

/** The check trials of a study: known differences beside the question, and the same with the same. */
export const checkDraft = z.strictObject({
  /** The study's cable that check cables are compared with. */
  reference: z.union([z.literal(0), z.literal(1)], 'Choose a cable'),
  steps: z.array(checkStepDraft).max(mostSteps, `At most ${mostSteps} steps`),
  /** Trials of the reference cable with itself, in each session. */
  same: whole(0, 20, 'trials'),
  /** Whether a second result leaves out the listeners who do not hear the largest step. */
  excludes: z.boolean(),
});
export type CheckDraft = z.output<typeof checkDraft>;

/** What a study's choice of check trials amounts to in each session. */
export const checkTrialsOf = (checks: CheckDraft | undefined): number =>
  checkTrialsIn(checks && { steps: checks.steps.map(({ trials }) => trials), same: checks.same });

type Fault = { readonly path: (string | number)[]; readonly message: string };

/** What is wrong with check trials as part of a study: beside its method, its cables and one another. */
export function checkFaults(
  checks: CheckDraft,
  study: MethodChoices & WaysToRun & { method: MethodId; cables: readonly { cableId: string }[] },
): Fault[] {
  const { steps, same, excludes } = checks;
  const faults: Fault[] = [];
  const refused = methods[study.method].takesNoSteps(study);
  if (refused !== null && steps.length > 0) faults.push({ path: ['steps'], message: refused });
  if (steps.length === 0 && same === 0)
    faults.push({ path: ['same'], message: 'Add a step, or trials of the same with the same' });
  if (steps.length === 0 && excludes)
    faults.push({ path: ['excludes'], message: 'Without a step nobody can fail to hear it' });
  if (study.separateSpecimens && same > 0)
    faults.push({ path: ['same'], message: 'With separate specimens the same code would come twice: set this to 0' });
  const seen = new Set(study.cables.map(({ cableId }) => cableId));
  const sizes = new Set<number>();
  for (const [index, { cableId, specimenIds, milliDb }] of steps.entries()) {
    if (study.separateSpecimens && specimenIds.length > 0 && specimenIds.length < leastSeparate)
      faults.push({
        path: ['steps', index, 'specimenIds'],
        message: 'Choose at least two: separate specimens need two of each cable',
      });
    if (seen.has(cableId))
      faults.push({ path: ['steps', index, 'cableId'], message: 'Choose a cable that the study has not yet' });
    if (sizes.has(milliDb)) faults.push({ path: ['steps', index, 'milliDb'], message: 'Each step once' });
    seen.add(cableId);
    sizes.add(milliDb);
  }
  return faults;
}
