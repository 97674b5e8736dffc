/**
 * Hypotheses asked in an order fixed beforehand, each at the whole level, up to the first that does not reach it.
 *
 * No error is spent on the order: a true null hypothesis is rejected falsely only if the first true one in the order is,
 * and that happens at most as often as the level says.
 *
 * @param reaches in the fixed order, whether p reaches the level
 * @returns for each whether it was asked, and whether it and all before it reach the level
 * @example fixedSequence([true, false, true]) // asked, asked, not asked; only the first holds
 * @see Maurer, Hothorn and Lehmacher, in Vollmar (ed.), Biometrie in der chemisch-pharmazeutischen Industrie 6 (1995),
 *   3-18; Westfall and Krishen, J. Statist. Planning and Inference 99 (2001), 25-40 (both from memory)
 */
export function fixedSequence(reaches: readonly boolean[]): { isAsked: boolean; holds: boolean }[] {
  const stop = reaches.indexOf(false);
  const end = stop < 0 ? reaches.length : stop;
  return reaches.map((_, index) => ({ isAsked: index <= end, holds: index < end }));
}
