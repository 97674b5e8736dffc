import { detectableRate } from '../statistics/detectable-rate.ts';
import type { DifferenceWords } from './difference-finding.ts';
import { averageWords, confidenceText } from './finding.ts';
import type { ForcedChoiceResult } from './forced-choice-result.ts';
import { formatShare } from './format-probability.ts';

/** How large the effect is, with the one-sided limit that belongs to a one-sided test. */
function effect(result: ForcedChoiceResult): string {
  if (result.estimates === null) return noLimits;
  const { rate, interval, oneSidedLower } = result.estimates.aboveGuessing;
  const range = `${formatShare(Number(interval.lower), 'down')} to ${formatShare(Number(interval.upper), 'up')}`;
  const lower = `one-sided ${confidenceText(oneSidedLower.confidence)} lower limit ${formatShare(Number(oneSidedLower.limit), 'down')}`;
  return `Share of answers above guessing: ${formatShare(Number(rate), 'nearest')} (95% interval ${range}; ${lower}${basisOf(result)}).${aboutWhom(result)}`;
}

/** Nothing varied from trial to trial, or there were too few of them. */
const noLimits = 'No interval is stated: trials are counted, and they were too few or all came out alike.';

const basisOf = ({ estimates }: ForcedChoiceResult) =>
  estimates?.basis === 'trials' ? '; counted by trials, which the listeners shared' : '';

/** Limits over several listeners are about their answers, unless they are a sample and the interval counts people. */
function aboutWhom(result: ForcedChoiceResult): string {
  const { people } = result;
  if (people === null) return averageWords(result);
  const { lower, upper } = people.aboveGuessing;
  const counted = people.basis === 'listeners' ? 'listeners are counted' : 'listeners and trials are both counted';
  return ` That is this panel’s average. For people of whom they are a sample (${people.samplingFrame}), where ${counted}: ${formatShare(Number(lower), 'down')} to ${formatShare(Number(upper), 'up')} (95% interval).`;
}

/** What a result that found nothing leaves open. */
function openQuestion(result: ForcedChoiceResult): string {
  const { estimates, answers, alpha, test, chance } = result;
  if (answers === 0) return 'No answers were counted.';
  if (estimates === null) return noLimits;
  const { confidence, limit } = estimates.aboveGuessing.oneSidedUpper;
  // A group's power has no formula: what it could have found is not said afterwards.
  const rate = test === 'exact-binomial' ? detectableRate(answers, chance, Number(alpha), 0.8) : null;
  const found =
    rate === null
      ? ''
      : ` It could have found a listener who is right ${formatShare(rate, 'up')} of the time, with 80% power.`;
  const open = `An above-chance rate up to ${formatShare(Number(limit), 'up')} is not excluded (one-sided ${confidenceText(confidence)} limit${basisOf(result)}).`;
  return `${Number(limit) > 0 ? open : 'Scores were lower than guessing usually gives.'}${found}${aboutWhom(result)}`;
}

/** From this factor on evidence is said to lean (Kass and Raftery call 3 to 20 positive, 20 to 150 strong). */
const leansFrom = 10;

/** Row 13: guessing explains the answers far better. It does not replace the registered rule, and the prior is named. */
function evidence({ guessingFactor }: ForcedChoiceResult): string | null {
  if (guessingFactor === null || Number(guessingFactor.uniform) < leansFrom) return null;
  const timesWords = (factor: string) => `${Number(factor).toPrecision(2)} times`;
  const beside =
    guessingFactor.middle === null
      ? ''
      : `; ${timesWords(guessingFactor.middle)} with Beta(2, 2) of the rate above chance`;
  return `Evidence leans towards no difference: guessing explains the answers ${timesWords(guessingFactor.uniform)} better than a share above guessing spread evenly from 0 to 100% (Bayes factor${beside}). It excludes nothing.`;
}

const belowMargin = ({ margin }: ForcedChoiceResult): string =>
  `the share of answers above guessing is below ${formatShare(Number(margin?.share ?? 0), 'nearest')}`;

/** What the finding of a method with one right answer says of its figures. */
export const forcedChoiceWords: Pick<
  DifferenceWords<ForcedChoiceResult>,
  'counted' | 'effect' | 'open' | 'evidence' | 'belowMargin'
> = {
  counted: ({ correct, answers }) => `${correct} of ${answers} right`,
  effect,
  open: openQuestion,
  evidence,
  belowMargin,
};
