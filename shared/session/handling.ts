import type { SessionState } from './state.ts';

/** How cables were told apart by hand in a session, for its report. */
export type Handling = {
  /** Ends scanned at changes. */
  readonly scanned: number;
  readonly byHand: number;
  readonly wrong: number;
  /** Steps taken back. */
  readonly undone: number;
  /** What the inventory came to; null where none was ended. */
  readonly inventory: {
    readonly codes: number;
    readonly missing: string[];
    readonly foreign: string[];
    readonly reason: string;
  } | null;
};

export function handlingOf({ scans, inventory: { ended, foreign } }: SessionState): Handling {
  const { made, byHand, wrong, undone } = scans;
  const inventory =
    ended === null
      ? null
      : { codes: ended.codes, missing: [...ended.missing], foreign: [...foreign], reason: ended.reason };
  return { scanned: made, byHand, wrong, undone, inventory };
}

const count = (number: number, one: string, many = `${one}s`) => `${number} ${number === 1 ? one : many}`;

/**
 * The same in sentences, none where there is nothing to tell.
 *
 * @example handlingWords({ scanned: 34, byHand: 0, wrong: 1, undone: 0, inventory: null })
 *   // ['Labels: 34 ends scanned, 0 changes confirmed by hand, 1 wrong label refused before it was heard.']
 */
export function handlingWords({ scanned, byHand, wrong, undone, inventory }: Handling): string[] {
  const labels = `Labels: ${count(scanned, 'end')} scanned, ${count(byHand, 'change')} confirmed by hand, ${count(wrong, 'wrong label')} refused before anything was heard.`;
  return [
    ...(scanned + byHand + wrong === 0 ? [] : [labels]),
    ...(undone === 0 ? [] : [`${count(undone, 'step')} of a change taken back and done again.`]),
    ...(inventory === null ? [] : [inventoryWords(inventory)]),
  ];
}

function inventoryWords({ codes, missing, foreign, reason }: NonNullable<Handling['inventory']>): string {
  const found =
    missing.length === 0
      ? `Inventory at the end: all ${codes} codes found.`
      : `Inventory at the end: ${missing.join(', ')} of ${codes} codes not found. Reason: ${reason}.`;
  return foreign.length === 0 ? found : `${found} Foreign: ${foreign.join(', ')}.`;
}
