import { anyDifference, type DifferenceWords } from './difference-finding.ts';
import { averageWords } from './finding.ts';
import { formatShare } from './format-probability.ts';
import type { SameDifferentResult } from './same-different-result.ts';

/** A limit or d′ as it is read: "2.02", or what Infinity stands for. */
export const sensitivityFace = (limit: string): string =>
  limit === 'Infinity' ? 'no upper limit' : Number(limit).toFixed(2);

const share = (rate: string) => formatShare(Number(rate), 'nearest');

const basisOf = ({ estimates }: SameDifferentResult) =>
  estimates?.basis === 'trials' ? '; counted by trials, which the listeners shared' : '';

function effect(result: SameDifferentResult): string {
  const { estimates } = result;
  if (estimates === null)
    return 'No rate is stated with limits: trials are counted, and they were too few or all came out alike.';
  const { dPrime, lower, upper } = estimates.dPrime;
  return `“Different” was said on ${share(estimates.hitRate)} of different trials and on ${share(estimates.falseAlarmRate)} of same ones; d′ ${sensitivityFace(dPrime)} if percepts are compared by differences (95% limits ${sensitivityFace(lower)} to ${sensitivityFace(upper)}${basisOf(result)}).${averageWords(result)}`;
}

function open(result: SameDifferentResult): string {
  const { estimates, answers, differentTrials, trials } = result;
  if (answers === 0) return 'No answers were counted.';
  if (differentTrials === 0 || differentTrials === trials)
    return 'The coins gave trials of one kind alone, so that nothing could be compared.';
  if (estimates === null)
    return 'No limit of d′ is given: trials are counted, and they were too few or all came out alike.';
  const { upper } = estimates.dPrime;
  const limit =
    upper === 'Infinity' ? 'No d′ is excluded from above' : `A d′ up to ${sensitivityFace(upper)} is not excluded`;
  return `${limit} (limits at 95% or more, if percepts are compared by differences${basisOf(result)}).${averageWords(result)}`;
}

/** What the finding of same-different says of its figures: hits and false alarms, never a percentage of right answers. */
export const sameDifferentWords: DifferenceWords<SameDifferentResult> = {
  ...anyDifference,
  counted: ({ onDifferent, onSame }) =>
    `“different” ${onDifferent.different} times in ${onDifferent.answers} answers on different trials and ${onSame.different} times in ${onSame.answers} on same ones`,
  effect,
  open,
  evidence: () => null,
  belowMargin: () => {
    throw new RangeError('same-different takes no margin');
  },
};
