import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { writeZip } from '#shared/bundle/zip.ts';
import { publicationParts } from '#shared/ledger/publication-parts.ts';
import { verifyStudy } from '#shared/ledger/verify.ts';
import { type MethodId, methodIds } from '#shared/methods/methods.ts';
import { bundleFiles, bundleSource } from '../support/bundle.ts';
import { closedStudy } from '../support/closed-study.ts';

const ladder = [
  { milliDb: 1000, trials: 2 },
  { milliDb: 500, trials: 2 },
];

describe.each(methodIds)('a closed study with check trials, %s', (method: MethodId) => {
  it('verifies from its document alone: draws, kinds, figures and every trial accounted for [S88]', () => {
    const checks = verifyStudy(publicationParts(closedStudy(2, method, undefined, false, {}, ladder)));
    expect(checks.filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
    expect(checks.find(({ id }) => id === 'flow')?.reason).toMatch(/counted, \d+ check trials, 1 void/);
  });
});

describe('the tables of a bundle with check trials', () => {
  const folder = mkdtempSync(join(tmpdir(), 'fairlead-checks-'));
  const lines = (name: string) => readFileSync(join(folder, name), 'utf8').trim().split('\r\n');
  beforeAll(() => {
    const files = bundleFiles(bundleSource(closedStudy(3, 'abx', undefined, false, {}, ladder)));
    for (const [name, bytes] of files) if (!name.includes('/')) writeFileSync(join(folder, name), bytes);
    writeFileSync(join(folder, 'bundle.zip'), writeZip(files));
  });
  afterAll(() => rmSync(folder, { recursive: true }));

  it('mark every check trial with its kind and its size, and give what they came to [S88]', () => {
    const [names, ...trials] = lines('trials.csv');
    expect(names?.endsWith(',kind,step_mdb')).toBe(true);
    const first = trials.filter((row) => row.startsWith('1,'));
    expect(first.filter((row) => /,counted,.*,check,1000$/.test(row))).toHaveLength(2);
    expect(first.filter((row) => /,counted,.*,check,500$/.test(row))).toHaveLength(2);
    expect(first.filter((row) => /,counted,.*,same,$/.test(row))).toHaveLength(1);
    expect(first.filter((row) => /,counted,.*,main,$/.test(row))).toHaveLength(5);
    expect(lines('checks.csv')).toContain('steps/0/milliDb,1000');
  });

  it('lets R recompute the registered figures from the main trials alone [S88] [Z3]', () => {
    const run = spawnSync('Rscript', ['recompute.R'], { cwd: folder, encoding: 'utf8' });
    expect(run.stdout).toContain('Every figure agrees with the recorded result.');
    expect(run.status).toBe(0);
    writeFileSync(
      join(folder, 'answers.csv'),
      lines('answers.csv')
        .join('\r\n')
        .replace(/,check$/gm, ',main'),
    );
    const bent = spawnSync('Rscript', ['recompute.R'], { cwd: folder, encoding: 'utf8' });
    expect(bent.status).toBe(1);
  }, 300_000);

  it('is read alike by a program that was written from the specification alone [S84] [Z7]', () => {
    const reread = spawnSync('python3', ['tests/tools/reread.py', join(folder, 'bundle.zip')], { encoding: 'utf8' });
    expect(reread.stderr).toBe('');
    expect(reread.status).toBe(0);
  });
});
