/** Words that say nothing about which cable it is, however often they are part of a name. */
const silent = new Set([
  ...['cable', 'cables', 'lead', 'leads', 'wire', 'wires', 'pair', 'set', 'the', 'and', 'for', 'with', 'from', 'our'],
  ...['new', 'old', 'one', 'two', 'test', 'study', 'listening', 'blind', 'comparison', 'prototype', 'reference'],
  ...['loudspeaker', 'speaker', 'interconnect', 'headphone', 'sample', 'type', 'version', 'model'],
]);

/**
 * The words of the chosen cables' names that a title gives away, in the order of the title. A warning, not a verdict:
 * whether a title is neutral is for a person to say.
 *
 * @example tellingWords('Silver against copper', ['Harbour silver 3 m', 'Harbour copper 3 m']) // ['silver', 'copper']
 */
export function tellingWords(title: string, cableNames: readonly string[]): string[] {
  const told = new Set(cableNames.flatMap(wordsOf).filter((word) => !silent.has(word) && isTelling(word)));
  return [...new Set(wordsOf(title).filter((word) => told.has(word)))];
}

/** Runs of letters and figures; a decimal such as 0.5 is one word. */
function wordsOf(text: string): string[] {
  return text.toLocaleLowerCase('en').match(/\p{N}+[.,]\p{N}+|[\p{L}\p{N}]+/gu) ?? [];
}

/** "3 m" tells nothing; "0.5", "12a" and "silver" do. */
function isTelling(word: string): boolean {
  return word.length >= 3 || (word.length === 2 && /\p{N}/u.test(word));
}
