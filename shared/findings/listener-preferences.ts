import { clopperPearson } from '../statistics/clopper-pearson.ts';
import { type Fraction, fractionToNumber } from '../statistics/fraction.ts';
import { holm } from '../statistics/holm.ts';
import { exactTwoSidedEven } from '../statistics/two-sided-even.ts';
import type { ListenerPreference } from './preference-result.ts';
import { type PreferenceTrial, preferredCable } from './preference-trials.ts';
import { recordDecimal } from './record-decimal.ts';

/**
 * Each listener's own preference, in the order of their labels.
 *
 * One listener gives one answer per trial, so their own answers face independent draws and the exact binomial holds
 * for each of them, in a group too. The adjustment runs over all who had an answer due, also those who left.
 *
 * @param trials all locked trials
 * @param level  the registered two-sided level
 * @returns counts, exact two-sided p, Holm-adjusted p and an interval of confidence 1 - level, per listener
 * @example a listener who preferred the first cable 12 times and the second 3 times: p 9/256 = 0.0352
 *   ; R: binom.test(12, 15)$p.value
 * @see exactTwoSidedEven and holm for the sources
 */
export function listenerPreferences(trials: readonly PreferenceTrial[], level: Fraction): ListenerPreference[] {
  const counts = [...countsByListener(trials)].sort(([a], [b]) => (a < b ? -1 : 1));
  const alpha = fractionToNumber(level);
  const pValues = counts.map(([, { preferred }]) =>
    fractionToNumber(exactTwoSidedEven(preferred[0], preferred[0] + preferred[1])),
  );
  const adjusted = holm(pValues);
  return counts.map(([listener, own], index) => {
    const holmP = adjusted[index] ?? 1;
    return {
      listener,
      ...own,
      p: recordDecimal(pValues[index] ?? 1),
      holmP: recordDecimal(holmP),
      favours: holmP <= alpha ? favoured(own.preferred) : null,
      interval: shareInterval(own.preferred, alpha),
    };
  });
}

/** The cable with more answers, or null when both have as many. */
export function favoured([first, second]: readonly [number, number]): 0 | 1 | null {
  if (first === second) return null;
  return first > second ? 0 : 1;
}

/**
 * Clopper-Pearson limits of the first cable's share of the answers that preferred one, with confidence 1 - level: they
 * leave out a half just where the two-sided p reaches the level.
 *
 * @param preferred answers for the first and the second cable, each with a draw of its own
 * @param alpha     the registered two-sided level
 * @returns limits as they stand on the record; null when no answer preferred one
 * @throws RangeError when an argument is outside its domain
 * @example shareInterval([12, 3], 0.05) // 0.5191, 0.9567 ; R: binom.test(12, 15)$conf.int
 * @see clopperPearson for the source
 */
export function shareInterval(
  [first, second]: readonly [number, number],
  alpha: number,
): ListenerPreference['interval'] {
  if (first + second === 0) return null;
  const { lower, upper } = clopperPearson(first, first + second, 1 - alpha);
  return { confidence: recordDecimal(1 - alpha), lower: recordDecimal(lower), upper: recordDecimal(upper) };
}

type Counts = { answers: number; missing: number; undecided: number; preferred: [number, number] };

function countsByListener(trials: readonly PreferenceTrial[]): Map<string, Counts> {
  const counts = new Map<string, Counts>();
  for (const { truth, answers } of trials) {
    for (const { listener, choice } of answers) {
      const before = counts.get(listener) ?? { answers: 0, missing: 0, undecided: 0, preferred: [0, 0] };
      const cable = preferredCable(truth, choice);
      counts.set(listener, {
        answers: before.answers + 1,
        missing: before.missing + (choice === null ? 1 : 0),
        undecided: before.undecided + (choice === 'none' ? 1 : 0),
        preferred: [before.preferred[0] + (cable === 0 ? 1 : 0), before.preferred[1] + (cable === 1 ? 1 : 0)],
      });
    }
  }
  return counts;
}
