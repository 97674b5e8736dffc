import { z } from 'zod';
import { fairNumber } from './fair-number.ts';

/**
 * What a trial is: a main one, which the registered analysis reads; a check trial of the protocol's step at this place,
 * from 0; or the reference cable with itself. Which trial is what is drawn, and sealed with the rest of the draw.
 */
export const trialKind = z.templateLiteral([
  z.enum(['main', 'same', 'step/0', 'step/1', 'step/2', 'step/3', 'step/4']),
]);
export type TrialKind = z.output<typeof trialKind>;

/** The most steps that a ladder of known differences has. */
export const mostSteps = 5;

/** The check trials of a session, as counts alone: nothing here names a cable or a size. */
export const checkShape = z.strictObject({
  /** The protocol's cable that check cables are compared with. */
  reference: z.union([z.literal(0), z.literal(1)]),
  /** Trials of each step, the largest difference first. */
  steps: z.array(z.int().min(1)).max(mostSteps),
  /** Trials of the reference cable with itself. */
  same: z.int().min(0),
});
export type CheckShape = z.output<typeof checkShape>;

/** The place of a trial's step, from 0, or null for a trial that has none. */
export function stepOf(kind: TrialKind): number | null {
  return kind.startsWith('step/') ? Number(kind.slice('step/'.length)) : null;
}

/** How many trials of a session are check trials. */
export function checkTrialsIn(checks: Pick<CheckShape, 'steps' | 'same'> | undefined): number {
  return checks === undefined ? 0 : checks.steps.reduce((sum, trials) => sum + trials, checks.same);
}

/**
 * What each registered trial of a session is: every order of the registered numbers is as likely.
 *
 * The kinds are laid out (main ones, then the steps, then the same with the same) and shuffled from the end with fair
 * numbers under labels of their own, so that no truth depends on them and none on a truth.
 *
 * @param seed   of the session's draw
 * @param trials registered trials, check trials included, at most 256; spares stand for others and are not among them
 * @throws RangeError when there are more check trials than trials
 * @see Fisher and Yates, Statistical Tables (1938), example 12; Durstenfeld, Comm. ACM 7 (1964), 420
 */
export function drawKinds(seed: string, trials: number, checks: CheckShape): TrialKind[] {
  const main = trials - checkTrialsIn(checks);
  if (main < 0) throw new RangeError('more check trials than trials');
  const kinds: TrialKind[] = [
    ...Array.from({ length: main }, () => 'main' as const),
    ...checks.steps.flatMap((count, step) => Array.from({ length: count }, () => `step/${step}` as TrialKind)),
    ...Array.from({ length: checks.same }, () => 'same' as const),
  ];
  for (let last = kinds.length - 1; last > 0; last -= 1) {
    const chosen = fairNumber(seed, `kind/${last + 1}`, last + 1);
    [kinds[last], kinds[chosen]] = [kinds[chosen] as TrialKind, kinds[last] as TrialKind];
  }
  return kinds;
}

/**
 * The number of the protocol's or the code key's cable that is fitted at a place of a trial. A check trial has the
 * reference cable where a main one has the protocol's first, and the check cable of its step where it has the second.
 *
 * @param place which of the two cables a main trial would have there
 * @returns 0 or 1 for the protocol's cables, 2 and up for the check cables in the protocol's order
 */
export function cableFitted(place: 0 | 1, kind: TrialKind, reference: 0 | 1): number {
  if (kind === 'main') return place;
  const step = stepOf(kind);
  return place === 0 || step === null ? reference : firstCheckCable + step;
}

/** Where check cables stand in the code key: after the protocol's two. */
export const firstCheckCable = 2;
