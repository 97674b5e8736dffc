import { beforeAll, describe, expect, it } from 'vitest';
import { checksOfBundle } from '#shared/bundle/verify-bundle.ts';
import { checksOfAnyFile, statusOf } from '#shared/bundle/verify-file.ts';
import { isZip } from '#shared/bundle/zip.ts';
import { bundleCheckNames } from '#shared/ledger/check-names.ts';
import type { Check } from '#shared/ledger/verify.ts';
import { bentBundles, type Whole, wholeBundle } from '../support/bent-bundles.ts';

async function checksOf(bytes: Uint8Array): Promise<Check[]> {
  const checks: Check[] = [];
  for await (const check of checksOfBundle(bytes, globalThis.crypto)) checks.push(check);
  return checks;
}

/** What `npm run verify` and a browser's worker make of any file, bundle or not; of a bundle it is the above. */
async function statusOfFile(bytes: Uint8Array): Promise<number> {
  const checks: Check[] = [];
  for await (const check of checksOfAnyFile(bytes, globalThis.crypto).checks) checks.push(check);
  return statusOf(checks);
}

describe('a bundle', () => {
  let whole: Whole;
  beforeAll(async () => {
    whole = await wholeBundle();
  }, 300_000);

  it('passes every line when nobody has bent it [Z1]', async () => {
    const checks = await checksOf(whole.zip);
    expect(checks.filter(({ outcome }) => outcome !== 'pass')).toEqual([]);
    expect(await statusOfFile(whole.zip)).toBe(0);
    expect(checks.map(({ id, name }) => ({ id, name }))).toEqual(bundleCheckNames);
  });

  it('is bent in sixty ways at least, no two alike [Z2]', () => {
    expect(bentBundles.length).toBeGreaterThanOrEqual(60);
    expect(new Set(bentBundles.map(({ name }) => name)).size).toBe(bentBundles.length);
  });

  it.each(bentBundles.map((bent) => [bent.name, bent] as const))(
    'shows %s at its line, and the command ends accordingly [Z2] [Z5]',
    async (_name, bent) => {
      const bytes = await bent.bend(whole);
      const checks = await checksOf(bytes);
      const line = checks.find(({ id }) => id === bent.line);
      expect(
        line?.outcome,
        JSON.stringify(
          checks.filter(({ outcome }) => outcome !== 'pass'),
          null,
          1,
        ),
      ).toBe(bent.outcome ?? 'fail');
      expect(line?.reason).toMatch(bent.says);
      const status = isZip(bytes) ? statusOf(checks) : await statusOfFile(bytes);
      expect(status).toBe(bent.outcome === 'not checkable' ? 2 : 1);
      if (bent.outcome === 'not checkable') expect(checks.filter(({ outcome }) => outcome === 'fail')).toEqual([]);
    },
  );
});
