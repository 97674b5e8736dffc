import { detectableRate } from '../statistics/detectable-rate.ts';
import type { DifferenceWords } from './difference-finding.ts';
import { averageWords, confidenceText } from './finding.ts';
import type { ForcedChoiceResult } from './forced-choice-result.ts';
import { formatShare } from './format-probability.ts';

/** How large the effect is, with the one-sided limit that belongs to a one-sided test. */
function effect(result: ForcedChoiceResult): string {
  if (result.estimates === null)
    return 'The listeners heard the same presentations, so no rate is stated for their answers together.';
  const { rate, interval, oneSidedLower } = result.estimates.aboveGuessing;
  const range = `${formatShare(Number(interval.lower), 'down')} to ${formatShare(Number(interval.upper), 'up')}`;
  const lower = `one-sided ${confidenceText(oneSidedLower.confidence)} lower limit ${formatShare(Number(oneSidedLower.limit), 'down')}`;
  return `Share of answers above guessing: ${formatShare(Number(rate), 'nearest')} (95% interval ${range}; ${lower}).${averageWords(result)}`;
}

/** What a result that found nothing leaves open. */
function openQuestion(result: ForcedChoiceResult): string {
  const { estimates, answers, alpha, test, chance } = result;
  if (answers === 0) return 'No answers were counted.';
  if (test === 'shared-presentations' || estimates === null)
    return 'No upper limit for the above-chance rate is valid for a group in this version, so none is given.';
  const { confidence, limit } = estimates.aboveGuessing.oneSidedUpper;
  const rate = detectableRate(answers, chance, Number(alpha), 0.8);
  const found =
    rate === null
      ? ''
      : ` It could have found a listener who is right ${formatShare(rate, 'up')} of the time, with 80% power.`;
  const open = `An above-chance rate up to ${formatShare(Number(limit), 'up')} is not excluded (one-sided ${confidenceText(confidence)} limit).`;
  return `${Number(limit) > 0 ? open : 'Scores were lower than guessing usually gives.'}${found}${averageWords(result)}`;
}

/** What the finding of a method with one right answer says of its figures. */
export const forcedChoiceWords: Pick<DifferenceWords<ForcedChoiceResult>, 'counted' | 'effect' | 'open'> = {
  counted: ({ correct, answers }) => `${correct} of ${answers} right`,
  effect,
  open: openQuestion,
};
