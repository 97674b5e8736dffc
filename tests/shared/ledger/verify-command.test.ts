import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { publicationParts, publicationText } from '#shared/ledger/publication-parts.ts';
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

  it('passes a published study, and names what fails in an altered one [V13]', { timeout: 60_000 }, () => {
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
});
