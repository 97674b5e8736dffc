import { decibels } from '../protocol/protocol-checks.ts';
import type { KnownDifferences } from './check-result.ts';

// What a finding says of known differences. Where the largest was not heard, finding nothing says nothing.

/** Whether the largest known difference was presented and not heard: then no claim of little or nothing is open. */
export const hasFailed = (known: KnownDifferences | null | undefined): boolean =>
  known != null && !known.largest.isHeard;

const notHeard = ({ largest }: KnownDifferences) =>
  `These listeners did not hear a known difference of ${decibels(largest.milliDb)} in this set-up${
    largest.canReachAlpha ? '' : '; its trials were too few to reach the registered level'
  }.`;

const heard = (known: KnownDifferences) =>
  known.sensitiveTo === null ? null : `These listeners heard a step of ${decibels(known.sensitiveTo)} in this set-up.`;

/** Beside a difference that was found. */
export function besideDifference(known: KnownDifferences | null | undefined): string[] {
  if (known == null) return [];
  const words = heard(known);
  return words === null
    ? [`${notHeard(known)} That they told the cables apart is therefore to be taken with caution.`]
    : [words];
}

/** Beside a result that found nothing, or little. */
export function besideNothing(known: KnownDifferences | null | undefined, isBarred: boolean): string[] {
  if (known == null)
    return ['No known difference was among the trials, so it is not known whether this set-up would have shown one.'];
  const words = heard(known);
  if (words !== null) return [words];
  const barred = isBarred
    ? ' The answers lie within the registered margin, which may not be claimed where a known difference goes unheard.'
    : '';
  return [`${notHeard(known)} Nothing follows from it that nothing was found.${barred}`];
}

/** Added to the sentence for use outside where a difference was found and the known one was not. */
export const cautionOutside = (known: KnownDifferences | null | undefined): string =>
  known != null && hasFailed(known)
    ? ` The same listeners did not hear a known difference of ${decibels(known.largest.milliDb)} in the same set-up.`
    : '';
