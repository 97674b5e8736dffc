import type { CablePlace } from './method.ts';

// Before the first trial both cables are heard once. Where a method gives them no names of its own, they are these.

export const oneAndOther = ['one', 'other'] as const;

const words: { readonly [presentation: string]: string } = { one: 'one cable', other: 'the other cable' };

/** A presentation in a sentence: its name in familiarisation, or "the first" and the like in a trial. */
export const spokenPlace = (presentation: string): string => words[presentation] ?? `the ${presentation}`;

/** Which cable is fitted in familiarisation: that of the session's first side comes first. */
export const fittedAtFirst = (isFirst: boolean, firstSide: CablePlace): CablePlace =>
  isFirst === (firstSide === 0) ? 0 : 1;
