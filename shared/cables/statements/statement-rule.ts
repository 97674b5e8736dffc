import type { CableDraft } from '#shared/contracts/cables.ts';
import type { Construction } from '#shared/contracts/construction.ts';

/** What a rule reads: what is stated of a cable, and nothing else. */
export interface StatedCable {
  readonly kind: CableDraft['kind'];
  readonly lengthMm: number;
  readonly description: string;
  readonly construction: Construction;
}

/** A rule about a statement: when it holds something under the light, why, and on what authority. It blocks nothing. */
export interface StatementRule {
  /** Permanent: evidence is filed under it. */
  readonly id: string;
  readonly title: string;
  /** The field that makes the statement; `description` is free text. */
  readonly field: keyof Construction | 'description';
  /** @returns what is to be said in plain words, or null where the rule has nothing to say */
  readonly look: (cable: StatedCable) => string | null;
  /** Why it is held under the light. */
  readonly reason: string;
  /** Where that can be read; "common practice, no source" where there is none. */
  readonly source: string;
}

const spoken = ({ construction, description }: StatedCable): string =>
  [construction.treatments, construction.connectors, construction.insulation, description].filter(Boolean).join('\n');

/** The first of some words in what is said about a cable, as it stands there. */
export function saidOf(cable: StatedCable, words: RegExp): string | null {
  return words.exec(spoken(cable))?.[0] ?? null;
}

/** A figure of at most three digits, as it is read. */
export const figureOf = (value: number) => value.toLocaleString('en', { maximumSignificantDigits: 3 });
