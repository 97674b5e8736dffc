import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { bundleCheckNames } from '#shared/ledger/check-names.ts';
import { fileDigest } from '#shared/ledger/digest.ts';
import { publicationParts, publicationText } from '#shared/ledger/publication-parts.ts';
import type { Check } from '#shared/ledger/verify.ts';
import { bentBundles, wholeBundle } from '../../support/bent-bundles.ts';
import { closedStudy } from '../../support/closed-study.ts';

describe('npm run verify', () => {
  const folder = mkdtempSync(join(tmpdir(), 'fairlead-verify-'));
  afterAll(() => rmSync(folder, { recursive: true }));

  const verify = (name: string, content: string | Uint8Array) => {
    writeFileSync(join(folder, name), content);
    const { status, stdout } = spawnSync('npm', ['run', '--silent', 'verify', '--', join(folder, name)], {
      encoding: 'utf8',
    });
    return { status, failed: stdout.split('\n').filter((line) => line.startsWith('fail')) };
  };

  it('passes a published study, and names what fails in an altered one [V13]', { timeout: 300_000 }, () => {
    const text = publicationText(publicationParts(closedStudy(1)));
    expect(verify('whole.json', text)).toEqual({ status: 0, failed: [] });
    const bent = text.replace('"choice":"A"', '"choice":"B"');
    expect(verify('bent.json', bent)).toEqual({
      status: 1,
      failed: [
        expect.stringMatching(/^fail +Answers match their leaves: Session \d, trial \d, L0\d: the answer does not/),
      ],
    });
    expect(verify('broken.json', Uint8Array.of(0xff, 0xfe))).toEqual({
      status: 1,
      failed: [expect.stringMatching(/File readable: It is not text in UTF-8\.$/)],
    });
  });

  it('says of a bundle what the page says, in JSON for programs, and ends accordingly [Z5]', {
    timeout: 300_000,
  }, async () => {
    const whole = await wholeBundle();
    const json = (name: string, content: Uint8Array) => {
      writeFileSync(join(folder, name), content);
      const { status, stdout } = spawnSync('npm', ['run', '--silent', 'verify', '--', join(folder, name), '--json'], {
        encoding: 'utf8',
      });
      return { status, said: JSON.parse(stdout) as { status: number; sha256: string; checks: Check[] } };
    };
    const passed = json('whole.zip', whole.zip);
    expect([passed.status, passed.said.status, passed.said.sha256]).toEqual([0, 0, fileDigest(whole.zip)]);
    expect(passed.said.checks.map(({ id, outcome }) => `${id} ${outcome}`)).toEqual(
      bundleCheckNames.map(({ id }) => `${id} pass`),
    );
    for (const name of ['an answer turned round', 'an answer in its table alone', 'a token that has not come yet']) {
      const bent = bentBundles.find((one) => one.name === name);
      if (bent === undefined) throw new Error(`there is no ${name}`);
      const { status, said } = json('bent.zip', await bent.bend(whole));
      expect([name, status, said.status]).toEqual([name, bent.outcome ? 2 : 1, bent.outcome ? 2 : 1]);
      const line = said.checks.find(({ id }) => id === bent.line);
      expect(line?.outcome).toBe(bent.outcome ?? 'fail');
      expect(line?.reason).toMatch(bent.says);
    }
    const none = spawnSync('npm', ['run', '--silent', 'verify', '--', join(folder, 'none.zip')], { encoding: 'utf8' });
    expect([none.status, none.stderr]).toEqual([3, expect.stringContaining('none.zip cannot be read')]);
  });
});
