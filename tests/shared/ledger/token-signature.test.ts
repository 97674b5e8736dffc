import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { fileDigest, utf8ToBytes } from '#shared/ledger/digest.ts';
import { timestampRequest } from '#shared/ledger/timestamp-token.ts';
import { tokenVerdict } from '#shared/ledger/token-signature.ts';

const settings = `[ req ]
distinguished_name = name
[ name ]
[ root ]
basicConstraints = critical, CA:TRUE
keyUsage = critical, keyCertSign
[ stamp ]
extendedKeyUsage = critical, timeStamping
[ other ]
extendedKeyUsage = clientAuth
[ authority ]
serial = ./serial
signer_cert = ./stamp.pem
signer_key = ./stamp.key
signer_digest = sha512
default_policy = 2.25.1
digests = sha256
`;
const bytes = utf8ToBytes('{"format":"fairlead-signed-head/1"}');
const stamped = { bytes, digest: fileDigest(bytes) };
const web = globalThis.crypto;

/** What openssl makes of a token: the same question, asked of another program. */
function opensslAccepts(folder: string): boolean {
  try {
    execFileSync(
      'openssl',
      ['ts', '-verify', '-data', 'data', '-in', 'reply.tsr', '-CAfile', 'root.pem', '-partial_chain'],
      {
        cwd: folder,
        stdio: 'pipe',
      },
    );
    return true;
  } catch {
    return false;
  }
}

describe.each(['rsa', 'ec'])('a token of an authority with a key of kind %s', (kind) => {
  const folder = mkdtempSync(join(tmpdir(), 'fairlead-token-'));
  const file = (name: string) => readFileSync(join(folder, name));
  const run = (...args: string[]) => execFileSync('openssl', args, { cwd: folder, stdio: 'pipe' });
  const newKey =
    kind === 'rsa' ? ['-newkey', 'rsa:2048'] : ['-newkey', 'ec', '-pkeyopt', 'ec_paramgen_curve:prime256v1'];

  beforeAll(() => {
    writeFileSync(join(folder, 'settings'), settings);
    writeFileSync(join(folder, 'serial'), '01\n');
    writeFileSync(join(folder, 'data'), bytes);
    writeFileSync(join(folder, 'request.tsq'), timestampRequest(stamped.digest, '8a62ae45c9351c9c'));
    const make = [...newKey, '-noenc', '-config', 'settings'];
    run(
      'req',
      '-x509',
      '-new',
      ...make,
      '-extensions',
      'root',
      '-subj',
      '/CN=root',
      '-keyout',
      'root.key',
      '-out',
      'root.pem',
    );
    run(
      'req',
      '-x509',
      '-new',
      ...make,
      '-extensions',
      'root',
      '-subj',
      '/CN=root',
      '-keyout',
      'no.key',
      '-out',
      'no.pem',
    );
    run('req', '-new', ...make, '-subj', '/CN=clock', '-keyout', 'stamp.key', '-out', 'stamp.csr');
    const sign = ['x509', '-req', '-in', 'stamp.csr', '-CA', 'root.pem', '-CAkey', 'root.key', '-CAcreateserial'];
    run(...sign, '-extfile', 'settings', '-extensions', 'stamp', '-out', 'stamp.pem');
    run(
      'ts',
      '-reply',
      '-config',
      'settings',
      '-section',
      'authority',
      '-queryfile',
      'request.tsq',
      '-out',
      'reply.tsr',
    );
  });
  afterAll(() => rmSync(folder, { recursive: true }));

  it('holds with the root or its own certificate, as openssl says too [X2] [Z4]', async () => {
    expect(opensslAccepts(folder)).toBe(true);
    for (const name of ['root.pem', 'stamp.pem']) {
      const verdict = await tokenVerdict(web, stamped, file('reply.tsr'), file(name).toString());
      expect(verdict).toMatchObject({ state: 'holds', time: expect.stringMatching(/^20\d\d-/) });
    }
  });

  it('is a fault for other bytes, another authority of the same name, or none [X3] [Z4]', async () => {
    const other = utf8ToBytes('something else');
    const whyOf = async (what: Parameters<typeof tokenVerdict>) => {
      const verdict = await tokenVerdict(...what);
      return verdict.state === 'fault' ? verdict.why : verdict.state;
    };
    const reply = file('reply.tsr');
    const root = file('root.pem').toString();
    expect(await whyOf([web, { bytes: other, digest: fileDigest(other) }, reply, root])).toMatch(/something else/);
    expect(await whyOf([web, stamped, reply, file('no.pem').toString()])).toMatch(/vouches for it/);
    expect(await whyOf([web, stamped, reply, ''])).toMatch(/vouches for it/);
    expect(await whyOf([null, stamped, reply, root])).toBe('not checkable');
  });

  // Bits outside what is signed (a version, a list of digests) may differ; what the token states may not.
  it('never states another time with one bit changed [Z4]', async () => {
    const reply = new Uint8Array(file('reply.tsr'));
    const root = file('root.pem').toString();
    const whole = await tokenVerdict(web, stamped, reply, root);
    let held = 0;
    for (let at = 0; at < reply.length; at += 7) {
      const bent = reply.slice();
      bent[at] = (bent[at] ?? 0) ^ 0x10;
      const verdict = await tokenVerdict(web, stamped, bent, root);
      if (verdict.state !== 'holds') continue;
      held += 1;
      expect(verdict).toEqual(whole);
    }
    expect(held).toBeLessThan(reply.length / 70);
  }, 300_000);
});
