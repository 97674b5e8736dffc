import type { Method } from '../methods/method.ts';
import type { CheckResult, CheckStep } from './check-result.ts';
import { equationOfP, formatProbability } from './format-probability.ts';

// The words of the report and the public page on check trials.

/** "6 of 8 right", or "3 of 4 hits, 1 of 4 false alarms". */
export function countsOf({ rates, missing }: Pick<CheckStep, 'rates' | 'missing'>): string {
  const counts = rates.map(({ label, counted, due }) => `${counted} of ${due} ${label.toLowerCase()}`).join(', ');
  return missing === 0 ? counts : `${counts}, ${missing} missing`;
}

export const pOfStep = ({ test }: CheckStep): string => (test === null ? '–' : formatProbability(Number(test.p.value)));

/** Whether a step was heard, and why it was not asked. */
export function heardWords({ isHeard, isAsked, test }: CheckStep): string {
  if (isHeard) return 'yes';
  if (test === null) return 'never presented';
  if (!isAsked) return 'not asked';
  return test.canReachAlpha ? 'no' : 'no, too few trials';
}

/** What the reference cable with itself was answered. */
export function habitsWords(same: CheckResult['same'], method: Method): string {
  if (same.trials === 0) return 'The reference cable was not compared with itself.';
  const options = method.options({ methodSettings: method.settings.map(({ id }) => id) });
  const counts = same.choices.map(
    ({ choice, count }) => `${count} said ${options.find(({ value }) => value === choice)?.short ?? choice}`,
  );
  const missing = same.missing === 0 ? '' : `, ${same.missing} missing`;
  return `The same with the same, ${same.trials} ${same.trials === 1 ? 'trial' : 'trials'}, ${same.answers} ${same.answers === 1 ? 'answer' : 'answers'} due: ${counts.join(', ')}${missing}. No answer is right there; they show habits and stand in no test.`;
}

/** The second result, where one is registered: never before the first. */
export function secondWords({ second }: CheckResult): string[] {
  if (second === undefined) return [];
  const { excluded, result } = second;
  if (excluded.length === 0)
    return ['Registered second result: every listener heard the largest step, so it is the first one.'];
  const left = `Registered second result, without ${excluded.join(', ')}, who did not hear the largest step`;
  if (result === null) return [`${left}: nobody is left.`];
  const counted =
    result.method === 'paired-preference' || result.method === 'same-different'
      ? ''
      : `${result.correct} of ${result.answers} right, `;
  const people = `${result.listeners} ${result.listeners === 1 ? 'listener' : 'listeners'}`;
  return [
    `${left}: ${people}, ${counted}${equationOfP(Number(result.p.value), Number(result.alpha))}. The result of all listeners stays the finding.`,
  ];
}
