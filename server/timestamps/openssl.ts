import { execFile } from 'node:child_process';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';

const run = promisify(execFile);
const longestMs = 20_000;

/** Runs openssl in a folder; what it said is in the error when it fails. */
export async function openssl(folder: string, args: readonly string[]): Promise<string> {
  try {
    const { stdout } = await run('openssl', [...args], { cwd: folder, timeout: longestMs });
    return stdout;
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'ENOENT') throw error;
    throw new Error('openssl is not installed here; Debian’s package openssl brings it', { cause: error });
  }
}

/** Gives work an empty folder, and removes it whatever happens. */
export async function inPassingFolder<T>(work: (folder: string) => Promise<T>): Promise<T> {
  const folder = await mkdtemp(join(tmpdir(), 'fairlead-time-'));
  try {
    return await work(folder);
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

const lineOf = (error: unknown) => {
  const said = String((error as { stderr?: unknown }).stderr ?? error);
  const why = said.match(/Verify error:.*|reason\(?.*|error:[^\n]*/)?.[0];
  return (why ?? said.trim().split('\n').at(-1) ?? '').slice(0, 200);
};

/**
 * Why a token's signature does not hold, or null when it does (RFC 3161, by `openssl ts -verify`).
 *
 * @param data         the bytes that were stamped
 * @param reply        the authority's reply in DER
 * @param certificates PEM: those to trust, from the one that signed up to any other
 * @param timeS        when the certificates must have been good, in seconds since 1970: the token's own time, so that a
 *                     token outlives its certificate
 */
export function tokenSignatureFault(
  data: Uint8Array,
  reply: Uint8Array,
  certificates: string,
  timeS: number,
): Promise<string | null> {
  return inPassingFolder(async (folder) => {
    await writeFile(join(folder, 'data'), data);
    await writeFile(join(folder, 'reply.tsr'), reply);
    await writeFile(join(folder, 'trusted.pem'), certificates);
    const trusting = ['-CAfile', 'trusted.pem', '-partial_chain', '-attime', String(timeS)];
    try {
      await openssl(folder, ['ts', '-verify', '-data', 'data', '-in', 'reply.tsr', ...trusting]);
      return null;
    } catch (error) {
      return lineOf(error);
    }
  });
}
