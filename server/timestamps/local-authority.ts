import { existsSync } from 'node:fs';
import { chmod, mkdir, mkdtemp, readFile, rename, rm, writeFile } from 'node:fs/promises';
import { join, resolve } from 'node:path';
import type { TimestampAuthority } from './authority.ts';
import { inPassingFolder, openssl } from './openssl.ts';

const lifeDays = 20 * 365;
// A policy of its own, below the arc for UUIDs (ITU-T X.667): nobody else's rules are meant.
const policy = '2.25.217318429551372054119236098134742716544';

const settings = `[ req ]
distinguished_name = name
[ name ]
[ root ]
basicConstraints = critical, CA:TRUE
keyUsage = critical, keyCertSign, cRLSign
subjectKeyIdentifier = hash
[ stamp ]
basicConstraints = critical, CA:FALSE
keyUsage = critical, digitalSignature
extendedKeyUsage = critical, timeStamping
subjectKeyIdentifier = hash
authorityKeyIdentifier = keyid
[ authority ]
serial = ./serial
signer_cert = ./stamp.pem
certs = ./root.pem
signer_key = ./stamp.key
signer_digest = sha256
default_policy = ${policy}
digests = sha256
clock_precision_digits = 3
ess_cert_id_alg = sha256
`;

const newKey = ['-newkey', 'ec', '-pkeyopt', 'ec_paramgen_curve:prime256v1', '-noenc', '-config', 'settings'];

const isMade = (folder: string) => existsSync(join(folder, 'stamp.pem'));

/** Makes root, certificate and keys beside the place where they will be kept, so that a start cut short leaves no half. */
async function make(parent: string, folder: string): Promise<void> {
  await mkdir(parent, { recursive: true, mode: 0o700 });
  const making = await mkdtemp(join(parent, 'making-'));
  try {
    await writeFile(join(making, 'settings'), settings);
    await writeFile(join(making, 'serial'), '01\n');
    const name = (what: string) => ['-subj', `/CN=Fairlead local ${what}, proves nothing about time`];
    await openssl(making, [
      ...['req', '-x509', '-new', ...newKey, '-extensions', 'root', '-days', String(lifeDays), ...name('root')],
      ...['-keyout', 'root.key', '-out', 'root.pem'],
    ]);
    await openssl(making, ['req', '-new', ...newKey, ...name('clock'), '-keyout', 'stamp.key', '-out', 'stamp.csr']);
    await openssl(making, [
      ...['x509', '-req', '-in', 'stamp.csr', '-CA', 'root.pem', '-CAkey', 'root.key', '-CAcreateserial'],
      ...['-days', String(lifeDays), '-extfile', 'settings', '-extensions', 'stamp', '-out', 'stamp.pem'],
    ]);
    for (const key of ['root.key', 'stamp.key']) await chmod(join(making, key), 0o600);
    await rename(making, folder);
  } catch (error) {
    await rm(making, { recursive: true, force: true });
    // Another server that shares the folder may have been first.
    if (!isMade(folder)) throw error;
  }
}

/**
 * The authority that stands in where none is set: made with openssl at the first start and kept in the data folder.
 * Whoever runs this machine can stamp any time with it.
 *
 * @throws Error when openssl is not there or the folder cannot be written
 */
export async function localAuthority(dataDir: string): Promise<TimestampAuthority> {
  const parent = resolve(dataDir);
  const folder = join(parent, 'timestamps');
  if (!isMade(folder)) await make(parent, folder);
  const trusted = await readFile(join(folder, 'root.pem'), 'utf8');
  // openssl counts its serial numbers in a file: one at a time.
  let last: Promise<unknown> = Promise.resolve();
  const stamp = (request: Uint8Array) =>
    inPassingFolder(async (passing) => {
      const [asked, reply] = [join(passing, 'request.tsq'), join(passing, 'reply.tsr')];
      await writeFile(asked, request);
      const made = ['-config', 'settings', '-section', 'authority', '-queryfile', asked, '-out', reply];
      await openssl(folder, ['ts', '-reply', ...made]);
      return new Uint8Array(await readFile(reply));
    });
  return {
    name: 'local authority',
    isLocal: true,
    trusted,
    ask: (request) => {
      const turn = last.then(() => stamp(request));
      last = turn.catch(() => undefined);
      return turn;
    },
  };
}
