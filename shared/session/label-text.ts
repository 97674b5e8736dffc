import { digest, hexToBytes, utf8ToBytes } from '../ledger/digest.ts';

// What a label's QR code holds: a prefix, the study's mark, the blind code, and which of the two ends it is on. Nothing in
// it tells a cable, and both labels of every specimen look alike. Only letters and figures that keyboard scanners type
// alike on the usual layouts: no sign, and none of A, M, Q, W, Y and Z; I and O could be read as figures.

const letters = 'BCDEFGHJKLNPRSTUVX';
const prefix = 'FL';

export type LabelEnd = 1 | 2;
export type Label = { readonly code: string; readonly mark: string | null; readonly end: LabelEnd | null };

/** A study's mark on its labels: four letters that follow from its id alone, so that another study's label is told apart. */
export function studyMark(studyId: string): string {
  const bytes = hexToBytes(digest('studyMark', utf8ToBytes(studyId)));
  return [...bytes.subarray(0, 4)].map((byte) => letters[byte % letters.length]).join('');
}

/** The text of a label. @example labelText('BDFK', '417', 1) // 'FLBDFK4171' */
export const labelText = (mark: string, code: string, end: LabelEnd): string => `${prefix}${mark}${code}${end}`;

const onLabel = new RegExp(`^${prefix}([${letters}]{4})([1-9]\\d\\d)([12])$`);
const onFirstLabels = /^FL.?([1-9]\d\d)$/;
const typed = /^[1-9]\d\d$/;

/** Whether a text can only come from a scanner, so that it is not taken for something typed. */
export const isFromScanner = (text: string): boolean => text.trim().toUpperCase().startsWith(prefix);

/**
 * Reads what a scanner, a camera or a person gave: a label's text, that of the first labels (no mark and no end), or the
 * three figures alone. Null when it is none of them.
 */
export function readLabel(text: string): Label | null {
  const plain = text.trim().toUpperCase();
  const whole = onLabel.exec(plain);
  if (whole?.[1] !== undefined && whole[2] !== undefined)
    return { mark: whole[1], code: whole[2], end: whole[3] === '1' ? 1 : 2 };
  const code = typed.test(plain) ? plain : onFirstLabels.exec(plain)?.[1];
  return code === undefined ? null : { code, mark: null, end: null };
}
