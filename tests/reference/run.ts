import { readFileSync } from 'node:fs';
import { checkFolder } from './check-folder.ts';
import type { Pending } from './check-records.ts';

// npm run reference:check -- FOLDER: every check value of a folder against the functions of shared/.

const here = new URL('../fixtures/reference/', import.meta.url);
const pending = JSON.parse(readFileSync(new URL('pending.json', here), 'utf8')) as Pending;
const folder = process.argv[2] ?? here.pathname;

const { lines, files, skipped } = checkFolder(folder, pending);
for (const { fn, cases, largestError, failures, pending: waits, isCompared } of lines) {
  const error = (isCompared ? largestError.toExponential(1) : 'pending').padStart(8);
  console.log(
    `${fn.padEnd(36)} ${String(cases).padStart(5)} cases ${error} ${String(failures.length).padStart(4)} failed`,
  );
  for (const reason of waits) console.log(`    pending: ${reason}`);
  for (const failure of failures.slice(0, 10)) console.log(`    DIFFERS: ${failure}`);
}
if (skipped.length > 0) console.log(`not lists of check values: ${skipped.join(', ')}`);

const cases = lines.reduce((sum, line) => sum + line.cases, 0);
const failed = lines.reduce((sum, line) => sum + line.failures.length, 0);
console.log(`${files} files, ${cases} cases, ${failed} failures`);
if (failed > 0 || cases === 0) process.exitCode = 1;
