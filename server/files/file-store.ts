import { createHash, randomBytes } from 'node:crypto';
import { mkdir, readFile, rename, rm, stat, writeFile } from 'node:fs/promises';
import { join } from 'node:path';

/** Keeps files by what is in them. A digest is lower-case hexadecimal SHA-256. */
export type FileStore = {
  /** Keeps bytes and says under which digest. The same bytes are kept once, and nothing kept is ever changed. */
  put(bytes: Uint8Array): Promise<string>;
  /**
   * The bytes of a digest, checked against it.
   *
   * @returns null when there are none
   * @throws Error when what lies there no longer has this digest
   */
  get(digest: string): Promise<Buffer | null>;
};

const digestOf = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex');
const isDigest = (text: string) => /^[0-9a-f]{64}$/.test(text);

/** A file store in a folder; what anybody called a file plays no part in where it lies. */
export function folderStore(folder: string): FileStore {
  const placeOf = (digest: string) => join(folder, digest.slice(0, 2), digest);
  return {
    async put(bytes) {
      const digest = digestOf(bytes);
      const place = placeOf(digest);
      if (await isThere(place)) return digest;
      await mkdir(join(folder, digest.slice(0, 2)), { recursive: true, mode: 0o700 });
      // Written beside its place and moved there, so that a file is whole or absent.
      const draft = `${place}.${randomBytes(6).toString('hex')}`;
      try {
        await writeFile(draft, bytes, { mode: 0o600, flush: true });
        await rename(draft, place);
      } finally {
        await rm(draft, { force: true });
      }
      return digest;
    },
    async get(digest) {
      if (!isDigest(digest) || !(await isThere(placeOf(digest)))) return null;
      const bytes = await readFile(placeOf(digest));
      if (digestOf(bytes) !== digest) throw new Error(`the file of digest ${digest} has been changed`);
      return bytes;
    },
  };
}

async function isThere(place: string): Promise<boolean> {
  try {
    return (await stat(place)).isFile();
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return false;
    throw error;
  }
}
