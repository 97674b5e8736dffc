import { unzipSync, zipSync } from 'fflate';

/** Far above any study, far below what hurts: a bundle larger than this is not opened. */
const mostBytes = 256 * 1024 * 1024;
const mostFiles = 2_000;

const namePattern = /^[A-Za-z0-9._-]+(\/[A-Za-z0-9._-]+)?$/;

/** Whether a file begins as a ZIP does. */
export const isZip = (bytes: Uint8Array) =>
  bytes[0] === 0x50 && bytes[1] === 0x4b && bytes[2] === 0x03 && bytes[3] === 0x04;

/** Files in one archive, always the same bytes for the same files: sorted, all of one time. */
export function writeZip(files: ReadonlyMap<string, Uint8Array>): Uint8Array {
  const sorted = [...files].sort(([a], [b]) => (a < b ? -1 : 1));
  // The earliest day that the format can write; bundles carry their times inside.
  return zipSync(Object.fromEntries(sorted), { level: 6, mtime: new Date(1980, 0, 1) });
}

/** Why a name or a size is refused, or null. */
function refusal(name: string, size: number, seen: ReadonlySet<string>, total: number): string | null {
  if (seen.size >= mostFiles) return 'It holds more files than a bundle can.';
  if (!namePattern.test(name) || name.split('/').some((part) => /^\.+$/.test(part)))
    return `It holds a file under a name that leads elsewhere: ${name.slice(0, 60)}`;
  if (seen.has(name)) return `It holds ${name} twice.`;
  if (total + size > mostBytes) return 'It would unpack to more than a bundle can hold.';
  return null;
}

/**
 * Unpacks an archive into memory, and into memory alone.
 *
 * Sizes and names are looked at before anything is unpacked, and each file is unpacked into no more room than it states.
 *
 * @returns files by name, or in a sentence why it is not opened
 */
export function readZip(bytes: Uint8Array): { files: ReadonlyMap<string, Uint8Array> } | { fault: string } {
  if (bytes.length > mostBytes) return { fault: 'It is larger than a bundle can be.' };
  const seen = new Set<string>();
  let total = 0;
  let fault: string | null = null;
  const stated = new Map<string, number>();
  try {
    const unpacked = unzipSync(bytes, {
      filter: ({ name, originalSize }) => {
        fault ??= refusal(name, originalSize, seen, total);
        if (fault !== null) return false;
        seen.add(name);
        total += originalSize;
        stated.set(name, originalSize);
        return true;
      },
    });
    if (fault !== null) return { fault };
    for (const [name, content] of Object.entries(unpacked))
      if (content.length !== stated.get(name)) return { fault: `${name} is not as long as the archive states.` };
    return { files: new Map(Object.entries(unpacked)) };
  } catch {
    return { fault: fault ?? 'It is no archive that can be unpacked, or a part of it is missing.' };
  }
}

/** The document of a bundle by itself, nothing else unpacked, or null where there is none. */
export function documentIn(bytes: Uint8Array): Uint8Array | null {
  try {
    const isDocument = ({ name, originalSize }: { name: string; originalSize: number }) =>
      name === 'study.json' && originalSize <= mostBytes;
    return unzipSync(bytes, { filter: isDocument })['study.json'] ?? null;
  } catch {
    return null;
  }
}
