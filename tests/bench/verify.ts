import { sha256 } from '@noble/hashes/sha2.js';
import { bundleFiles } from '#shared/bundle/bundle-files.ts';
import { checksOfAnyFile } from '#shared/bundle/verify-file.ts';
import { writeZip } from '#shared/bundle/zip.ts';
import { bundleSource, stampedSource } from '../support/bundle.ts';
import { longStudy } from '../support/long-study.ts';

// npm run bench:verify [-- TRIALS]: all checks of a bundle, as a multiple of one SHA-256 pass over the bytes that lie in it,
// timed in the same run on the same machine. Twice, the second bundle four times as long: a check that is not linear shows
// in the second. The limit is about three times what was measured when it was set.

const limit = 60;
const trialsPerSession = 100;

async function seconds(work: () => unknown): Promise<number> {
  const from = performance.now();
  await work();
  return (performance.now() - from) / 1000;
}

async function measure(trials: number): Promise<void> {
  // The tokens are made now, and are to lie before the first trial.
  const study = longStudy(Math.ceil(trials / trialsPerSession), trialsPerSession, Date.now() + 24 * 3_600_000);
  const files = bundleFiles(await stampedSource(bundleSource(study)));
  const zip = writeZip(files);
  const bytes = [...files.values()].reduce((sum, content) => sum + content.length, 0);
  const least = Math.min(
    ...(await Promise.all(
      [1, 2, 3].map(() =>
        seconds(() => {
          for (const content of files.values()) sha256(content);
        }),
      ),
    )),
  );
  const lines: string[] = [];
  const whole = await seconds(async () => {
    for await (const { id, outcome, reason } of checksOfAnyFile(zip, globalThis.crypto).checks)
      if (outcome !== 'pass') lines.push(`${id}: ${reason}`);
  });
  if (lines.length > 0) throw new Error(`the bundle does not pass: ${lines.join(' ')}`);
  const ratio = whole / least;
  console.log(
    `${ratio.toFixed(1).padStart(7)} x  every check of ${trials} trials, ${study.entries.length} entries, ${(bytes / 1e6).toFixed(1)} MB: ${whole.toFixed(1)} s\n           the floor: its bytes hashed once, ${least.toFixed(2)} s; ${ratio <= limit ? 'within' : 'BEYOND'} ${limit} x`,
  );
  if (ratio > limit) process.exitCode = 1;
}

const [wanted] = process.argv.slice(2);
const sizes = wanted === undefined ? [1_000, 4_000] : [Number(wanted)];
if (sizes.some((size) => !Number.isInteger(size) || size < 1)) throw new RangeError('say how many trials');
for (const size of sizes) await measure(size);
