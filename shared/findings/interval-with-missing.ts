import { clopperPearson, type Interval } from '../statistics/clopper-pearson.ts';
import { recordDecimal } from './record-decimal.ts';

const confidence = 0.95;

/** An interval as it stands on the record. */
export interface RecordedInterval {
  confidence: string;
  lower: string;
  upper: string;
}

/**
 * 95 % Clopper-Pearson interval of a rate of right answers that holds whatever the missing answers would have been:
 * they count as wrong for the lower limit and as right for the upper one. Without missing answers it is the plain interval.
 *
 * @param correct right answers
 * @param missing answers that did not come
 * @param answers answers due, missing ones included, at least 1
 * @returns limits as numbers
 * @throws RangeError when a count is outside its domain
 * @example limitsWithMissing(12, 0, 16) // 0.4762, 0.9273 ; R: binom.test(12, 16)$conf.int
 * @see clopperPearson for the source
 */
export function limitsWithMissing(correct: number, missing: number, answers: number): Interval {
  return {
    lower: clopperPearson(correct, answers, confidence).lower,
    upper: clopperPearson(correct + missing, answers, confidence).upper,
  };
}

/** The same as it stands on the record. */
export function intervalWithMissing(correct: number, missing: number, answers: number): RecordedInterval {
  return recordInterval(limitsWithMissing(correct, missing, answers));
}

/** Limits at 95 % as they stand on the record. */
export function recordInterval({ lower, upper }: Interval): RecordedInterval {
  return { confidence: recordDecimal(confidence), lower: recordDecimal(lower), upper: recordDecimal(upper) };
}
