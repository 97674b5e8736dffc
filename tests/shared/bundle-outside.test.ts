import { execFileSync, spawnSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { writeZip } from '#shared/bundle/zip.ts';
import { canonicalJson } from '#shared/ledger/canonical-json.ts';
import { nextEntry } from '#shared/ledger/chain.ts';
import { bytesToHex, fileDigest, utf8ToBytes } from '#shared/ledger/digest.ts';
import { answerLeaf, contributionCommitment } from '#shared/session/answer-leaf.ts';
import { drawSecretCommitment } from '#shared/session/commitments.ts';
import { drawSeed } from '#shared/session/draw.ts';
import { fairNumber } from '#shared/session/fair-number.ts';
import { requestLeaf } from '#shared/session/request-leaf.ts';
import { bundleFiles, bundleSource, stampedSource } from '../support/bundle.ts';
import { closedStudy } from '../support/closed-study.ts';

// What a stranger does with a bundle and without this program: openssl, sha256sum, R and Python from Debian.

const spec = readFileSync('docs/spec/bundle.md', 'utf8');
const unpack = (folder: string, files: ReadonlyMap<string, Uint8Array>) => {
  for (const [name, bytes] of files) {
    mkdirSync(dirname(join(folder, name)), { recursive: true });
    writeFileSync(join(folder, name), bytes);
  }
};

describe.each([
  ['abx', 1],
  ['abx', 3],
  ['triangle', 2],
  ['duo-trio', 2],
  ['same-different', 1],
  ['same-different', 3],
  ['directional-comparison', 2],
  ['paired-preference', 1],
  ['paired-preference', 3],
] as const)('the figures of %s with %i listeners', (method, listeners) => {
  it('are those that the script in the bundle computes in R, and an altered table is caught [Z3]', () => {
    const folder = mkdtempSync(join(tmpdir(), 'fairlead-recompute-'));
    try {
      unpack(folder, bundleFiles(bundleSource(closedStudy(listeners, method))));
      const run = () => spawnSync('Rscript', ['recompute.R'], { cwd: folder, encoding: 'utf8' });
      const whole = run();
      expect(whole.stdout).toContain('Every figure agrees with the recorded result.');
      expect([whole.status, (whole.stdout.match(/^agrees/gm) ?? []).length > 10]).toEqual([0, true]);
      const table = join(folder, 'answers.csv');
      const before = readFileSync(table, 'utf8');
      // The answers of the first trial, all turned into the other one.
      const swaps: Record<string, [string, string]> = {
        abx: ['A', 'B'],
        'same-different': ['same', 'different'],
        triangle: ['first', 'second'],
      };
      const [one, other] = swaps[method] ?? ['first', 'second'];
      const after = before.replace(/^1,1,L\d\d,[a-zA-Z]+/gm, (row) =>
        row.endsWith(`,${one}`) ? row.replace(`,${one}`, `,${other}`) : row.replace(/,[a-zA-Z]+$/, `,${one}`),
      );
      expect(after).not.toBe(before);
      writeFileSync(table, after);
      const bent = run();
      expect(bent.status).toBe(1);
      expect(bent.stdout).toMatch(/^DIFFERS/m);
    } finally {
      rmSync(folder, { recursive: true });
    }
  }, 60_000);
});

describe('a bundle without this program', () => {
  const folder = mkdtempSync(join(tmpdir(), 'fairlead-outside-'));
  const file = join(folder, 'bundle.zip');
  let entries = 0;

  beforeAll(async () => {
    const study = closedStudy(2, 'abx', Date.now() + 3_600_000);
    const files = bundleFiles(await stampedSource(bundleSource(study)));
    entries = study.entries.length + 1;
    unpack(folder, files);
    writeFileSync(file, writeZip(files));
  });
  afterAll(() => rmSync(folder, { recursive: true }));

  const openssl = (...args: string[]) => spawnSync('openssl', args, { cwd: folder, encoding: 'utf8' });

  it('has signatures and tokens that openssl confirms, and refuses once a bit has changed [Z3]', () => {
    const [key] = readdirSync(join(folder, 'keys'));
    const heads = readdirSync(join(folder, 'heads')).filter((name) => name.endsWith('.json'));
    expect(heads.length).toBeGreaterThan(4);
    for (const name of heads) {
      const head = `heads/${name.replace('.json', '')}`;
      const signature = ['-rawin', '-in', `${head}.json`, '-sigfile', `${head}.sig`];
      expect(openssl('pkeyutl', '-verify', '-pubin', '-inkey', `keys/${key}`, ...signature).status).toBe(0);
      const token = ['-data', `${head}.json`, '-in', `${head}.tsr`, '-CAfile', `${head}.certificates.pem`];
      expect(openssl('ts', '-verify', ...token, '-partial_chain').status).toBe(0);
    }
    writeFileSync(
      join(folder, 'bent'),
      readFileSync(join(folder, 'heads/1.json'), 'utf8').replace('sealing', 'closing'),
    );
    const bent = ['-rawin', '-in', 'bent', '-sigfile', 'heads/1.sig'];
    expect(openssl('pkeyutl', '-verify', '-pubin', '-inkey', `keys/${key}`, ...bent).status).not.toBe(0);
    const token = ['-data', 'bent', '-in', 'heads/1.tsr', '-CAfile', 'heads/1.certificates.pem', '-partial_chain'];
    expect(openssl('ts', '-verify', ...token).status).not.toBe(0);
  });

  it('names its document by the digest that sha256sum prints [Z3] [V6]', () => {
    const sum = execFileSync('sha256sum', ['study.json'], { cwd: folder, encoding: 'utf8' }).slice(0, 64);
    expect(readFileSync(join(folder, 'later.json'), 'utf8')).toContain(`"digest":"${sum}"`);
    expect(sum).toBe(fileDigest(readFileSync(join(folder, 'study.json'))));
  });

  it.each([
    ['abx', { separateSpecimens: true, onRequest: { most: 5 } }],
    ['triangle', { separateSpecimens: true }],
  ] as const)(
    'is read alike where %s is run from separate specimens or on request [Z7] [S41] [S55]',
    (method, ways) => {
      const other = join(folder, `${method}.zip`);
      const files = bundleFiles(bundleSource(closedStudy(1, method, undefined, false, ways)));
      expect(files.has('requests.csv')).toBe('onRequest' in ways);
      writeFileSync(other, writeZip(files));
      const read = spawnSync('python3', ['tests/tools/reread.py', other], { encoding: 'utf8' });
      expect(read.stderr).toBe('');
      expect(JSON.parse(read.stdout)).toMatchObject({ truths: 14 });
    },
  );

  it('is read alike by a program that was written from the specification alone [Z7]', () => {
    const reread = (archive: string) => spawnSync('python3', ['tests/tools/reread.py', archive], { encoding: 'utf8' });
    const whole = reread(file);
    expect(whole.stderr).toBe('');
    expect(JSON.parse(whole.stdout)).toMatchObject({ entries, truths: 14 });
    const study = readFileSync(join(folder, 'study.json'), 'utf8');
    const bent = join(folder, 'bent.zip');
    const files = new Map<string, Uint8Array>([
      ['study.json', utf8ToBytes(study.replace(/"choice":"A"/, '"choice":"B"'))],
      ['later.json', readFileSync(join(folder, 'later.json'))],
    ]);
    writeFileSync(bent, writeZip(files));
    expect(reread(bent).status).toBe(1);
  });
});

describe('the vectors of the specification', () => {
  const range = (from: number, to: number) => bytesToHex(Uint8Array.from({ length: to - from }, (_, n) => from + n));
  const [sixteen, first, second] = [range(0, 16), range(0, 32), range(32, 64)];
  const listed = (what: string) => spec.match(new RegExp(`^\\| ${what} \\|.*\\| \`([^\`]+)\` \\|$`, 'm'))?.[1];

  it('are what this program computes [Z7] [L1]', () => {
    const leaf = answerLeaf({ salt: sixteen, session: 's', seat: 'L01', trial: 1, choice: 'A', confidence: null });
    expect(listed('leaf')).toBe(leaf);
    const asked = { salt: sixteen, session: 's', seat: 'L01', trial: 1, presentation: 0, label: 'X' };
    expect(listed('leaf of a request')).toBe(requestLeaf(asked));
    expect(listed('a phone’s commitment') ?? listed("a phone's commitment")).toBe(contributionCommitment(first));
    expect(listed("a session's commitment")).toBe(drawSecretCommitment(first, second));
    const seed = drawSeed(first, [second]);
    expect(listed('seed')).toBe(seed);
    const trials = Array.from({ length: 8 }, (_, index) => fairNumber(seed, `trial/${index + 1}`, 6));
    expect(listed('numbers from that seed')).toBe(
      `${fairNumber(seed, 'side', 2)}; ${fairNumber(seed, 'specimen/1', 3)}; ${trials.join(' ')}`,
    );
    const at = '2026-01-01T00:00:00.000Z';
    const entry = nextEntry(null, { study: 's', at, kind: 'k', version: 1, payload: {}, nonce: sixteen });
    expect(listed('first entry')).toBe(entry.digest);
    expect(spec).toContain(bytesToHex(utf8ToBytes(canonicalJson({ b: [1, 'é'], a: null }))));
  });
});
