import type { Method } from '../methods/method.ts';

/** The answers that a draw can call for, in the method's order; "no preference" is none of them. */
export function labelsOf(method: Method): readonly string[] {
  const called = new Set(method.truths.map((truth) => labelOf(method, truth)));
  return method.options({}).flatMap(({ value }) => (called.has(value) ? [value] : []));
}

/** The answer that goes with a truth: the right one, or the place at which the first cable was heard where none is right. */
export const labelOf = (method: Method, truth: string): string => method.trials.answerFor(truth);

/** The presentations whose cable the draw of a trial decides; in ABX that is X alone. */
export function drawnPlaces(method: Method): readonly number[] {
  return [...method.presentations.keys()].filter(
    (place) => new Set(method.truths.map((truth) => cableAt(method, place, truth, 0))).size > 1,
  );
}

export function cableAt(method: Method, place: number, truth: string, firstSide: 0 | 1): 0 | 1 {
  const presentation = method.presentations[place];
  if (presentation === undefined) throw new RangeError(`there is no presentation ${place + 1}`);
  return method.fitted(presentation, truth, firstSide);
}
