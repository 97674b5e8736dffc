import type { Psychometric } from '../statistics/psychometric.ts';
import type { ForcedChoiceResult } from './forced-choice-result.ts';

/** A rule of deciding by which d′ is stated, and its words after a figure: "if by differences". */
export interface DecidingRule {
  readonly psychometric: Psychometric;
  readonly words: string;
}

/** A question with one right answer: what its registered analysis has to know of the method. */
export interface ForcedChoice {
  readonly method: ForcedChoiceResult['method'];
  /** The answers among which exactly one is right; by guessing each is right once in as many trials. */
  readonly labels: readonly string[];
  /** By name, as on the record; the first one is stated first. */
  readonly rules: { readonly [name: string]: DecidingRule };
}

/** Chance of a right answer by guessing, as an exact ratio: one label in as many. */
export const chanceOf = ({ labels }: Pick<ForcedChoice, 'labels'>) => ({ numerator: 1, denominator: labels.length });
