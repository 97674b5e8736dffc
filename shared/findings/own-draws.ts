type Seated = { readonly answers: readonly { readonly listener: string }[] };

/**
 * Whether every answer has a draw of its own: at most one seat in every trial of every session. Seats count, not
 * answers, so that the choice of the test does not depend on who happened to answer.
 *
 * @param trials all locked trials
 * @returns true for one listener at a time
 * @example hasOwnDraws([]) // true
 */
export function hasOwnDraws(trials: readonly Seated[]): boolean {
  return trials.every(({ answers }) => answers.length <= 1);
}

/**
 * Refuses trials that cannot be right: the same trial twice, or the same listener twice in one trial.
 *
 * @param trials all locked trials
 * @throws RangeError naming the first trial at fault
 * @example requireDistinct([]) // nothing to refuse
 */
export function requireDistinct(
  trials: readonly (Seated & { readonly session: number; readonly trial: number })[],
): void {
  const seen = new Set<string>();
  for (const { session, trial, answers } of trials) {
    const name = `session ${session}, trial ${trial}`;
    if (seen.has(name)) throw new RangeError(`${name} comes twice`);
    seen.add(name);
    if (new Set(answers.map(({ listener }) => listener)).size < answers.length) {
      throw new RangeError(`${name} has two answers of one listener`);
    }
  }
}
