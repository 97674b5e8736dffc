const mostCharacters = 120;
const standIn = 'file';

// Control characters, and those that turn the direction of writing: "gnp.exe" would read as "exe.png".
// biome-ignore lint/suspicious/noControlCharactersInRegex: they are what is taken out
const unseen = /[\u0000-\u001f\u007f-\u009f\u200b-\u200f\u2028-\u202e\u2060-\u2069\ufeff]/g;

/**
 * What to call a file that somebody sent, for people to read: its name without folders, markup, quotes and characters that
 * cannot be seen. It is shown and offered for saving, and is never a path on the server.
 *
 * @returns 1 to 120 characters; "file" where nothing is left
 */
export function cleanName(name: string): string {
  const last = name.normalize('NFC').split(/[\\/]/).at(-1) ?? '';
  const clean = last
    .replace(unseen, '')
    .replace(/[<>:"|?*'`;&$%{}=]/g, '_')
    .replace(/\s+/g, ' ')
    .replace(/^[.\s]+|[.\s]+$/g, '');
  if (clean === '') return standIn;
  return clean.length <= mostCharacters ? clean : shortened(clean);
}

/** Shorter, with the ending that says what it is. */
function shortened(name: string): string {
  const ending = /\.[A-Za-z0-9]{1,8}$/.exec(name)?.[0] ?? '';
  return `${name.slice(0, mostCharacters - ending.length)}${ending}`;
}
