/** What a file is, told from its bytes; what it is called says nothing. */
export type FileKind = 'text' | 'png' | 'jpeg' | 'webp' | 'pdf' | 'unknown';

const beginnings: readonly (readonly [FileKind, readonly number[]])[] = [
  ['png', [0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]],
  ['jpeg', [0xff, 0xd8, 0xff]],
  ['pdf', [0x25, 0x50, 0x44, 0x46, 0x2d]],
];

const beginsWith = (bytes: Uint8Array, beginning: readonly number[], at = 0) =>
  beginning.every((value, index) => bytes[at + index] === value);

const riff = [0x52, 0x49, 0x46, 0x46];
const webp = [0x57, 0x45, 0x42, 0x50];

/**
 * The kind of a file.
 *
 * @returns 'text' for text of tables and notes; a program, a script with a first line that names its interpreter, or a
 * page of markup is 'unknown'
 */
export function kindOfBytes(bytes: Uint8Array): FileKind {
  const known = beginnings.find(([, beginning]) => beginsWith(bytes, beginning));
  if (known !== undefined) return known[0];
  if (beginsWith(bytes, riff) && beginsWith(bytes, webp, 8)) return 'webp';
  const text = textOfBytes(bytes);
  return text !== null && !isProgram(text) ? 'text' : 'unknown';
}

const isProgram = (text: string) => /^\s*(#!|<(!doctype|html|script|svg|\?xml|\?php))/i.test(text);

// biome-ignore lint/suspicious/noControlCharactersInRegex: they are what is looked for
const controls = /[\u0000-\u0008\u000e-\u001f\u007f]/;

/**
 * The text of bytes: UTF-8 or UTF-16 by their mark, UTF-8 where they are sound as such, else Windows-1252, which
 * spreadsheets still write.
 *
 * @returns null when control characters show that it is no text
 */
export function textOfBytes(bytes: Uint8Array): string | null {
  const text = decoded(bytes);
  return controls.test(text) ? null : text;
}

function decoded(bytes: Uint8Array): string {
  if (beginsWith(bytes, [0xff, 0xfe])) return new TextDecoder('utf-16le').decode(bytes);
  if (beginsWith(bytes, [0xfe, 0xff])) return new TextDecoder('utf-16be').decode(bytes);
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch (error) {
    if (!(error instanceof TypeError)) throw error;
    return new TextDecoder('windows-1252').decode(bytes);
  }
}
