import { execFile } from 'node:child_process';
import { X509Certificate } from 'node:crypto';
import { chmod, mkdir, readFile, rename } from 'node:fs/promises';
import { hostname } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';

const run = promisify(execFile);

/** Browsers take no certificate of a longer life (CA/Browser Forum, Baseline Requirements 6.3.2, from memory). */
const lifeDays = 397;
const renewBeforeMs = 30 * 24 * 60 * 60 * 1000;

export type OwnCertificate = { readonly key: Buffer; readonly cert: Buffer; readonly fingerprint: string };

async function read(folder: string): Promise<OwnCertificate | null> {
  try {
    const [key, cert] = await Promise.all([readFile(join(folder, 'key.pem')), readFile(join(folder, 'cert.pem'))]);
    return { key, cert, fingerprint: new X509Certificate(cert).fingerprint256 };
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return null;
    throw error;
  }
}

function isGood({ cert }: OwnCertificate, addresses: readonly string[], now: number): boolean {
  const read = new X509Certificate(cert);
  const isFresh = Date.parse(read.validTo) - now > renewBeforeMs;
  return isFresh && addresses.every((address) => read.checkIP(address) !== undefined);
}

async function make(folder: string, addresses: readonly string[]): Promise<void> {
  const names = ['DNS:localhost', `DNS:${hostname()}`, ...addresses.map((address) => `IP:${address}`)].join(',');
  await run('openssl', [
    ...['req', '-x509', '-newkey', 'ec', '-pkeyopt', 'ec_paramgen_curve:prime256v1', '-noenc'],
    ...['-days', String(lifeDays), '-subj', `/CN=Fairlead on ${hostname()}`.slice(0, 64)],
    ...['-addext', `subjectAltName=${names}`],
    ...['-addext', 'basicConstraints=critical,CA:FALSE', '-addext', 'extendedKeyUsage=serverAuth'],
    ...['-keyout', join(folder, 'key.next'), '-out', join(folder, 'cert.next')],
  ]);
  await chmod(join(folder, 'key.next'), 0o600);
  await rename(join(folder, 'key.next'), join(folder, 'key.pem'));
  await rename(join(folder, 'cert.next'), join(folder, 'cert.pem'));
}

/**
 * The certificate that this machine signs for itself, made with openssl and kept in a folder.
 *
 * A new one is made when there is none, when an address is missing from it, or when it ends within 30 days.
 *
 * @param addresses IPv4 addresses that browsers will use
 * @throws Error when openssl cannot make one, or the folder cannot be written
 */
export async function ownCertificate(
  folder: string,
  addresses: readonly string[],
  now: number,
): Promise<OwnCertificate> {
  await mkdir(folder, { recursive: true, mode: 0o700 });
  const all = ['127.0.0.1', ...addresses];
  const kept = await read(folder);
  if (kept !== null && isGood(kept, all, now)) return kept;
  await make(folder, all);
  const made = await read(folder);
  if (made === null) throw new Error(`no certificate came about in ${folder}`);
  return made;
}
