import { readFileSync } from 'node:fs';
import { checksOfAnyFile, statusOf } from '#shared/bundle/verify-file.ts';
import { fileDigest } from '#shared/ledger/digest.ts';
import type { Check } from '#shared/ledger/verify.ts';

// npm run verify -- FILE [--json]: the checks of a downloaded bundle, or of the record alone, offline, by the code that the
// public page runs. Status 0: every line passed; 1: a line failed; 2: none failed, and not every one can be checked here.

function giveUp(words: string): never {
  process.stderr.write(`${words}\n`);
  process.exit(3);
}

function read(file: string): Uint8Array {
  try {
    return readFileSync(file);
  } catch (error) {
    return giveUp(`${file} cannot be read: ${error instanceof Error ? error.message : String(error)}`);
  }
}

const wanted = process.argv.slice(2);
const isJson = wanted.includes('--json');
const files = wanted.filter((word) => word !== '--json');
const [file] = files;
if (file === undefined || files.length > 1 || file.startsWith('--'))
  giveUp('Say which file: npm run verify -- fairlead-1a2b3c4d.zip [--json]');
const bytes = read(file);
const digest = fileDigest(bytes);
const checks: Check[] = [];
for await (const check of checksOfAnyFile(bytes, globalThis.crypto).checks) checks.push(check);
const status = statusOf(checks);
if (isJson) process.stdout.write(`${JSON.stringify({ file, sha256: digest, status, checks }, null, 2)}\n`);
else {
  process.stdout.write(`SHA-256 ${digest}\n\n`);
  for (const { name, outcome, reason } of checks) process.stdout.write(`${outcome.padEnd(14)}${name}: ${reason}\n`);
  const words = ['Every line passes.', 'A line fails.', 'No line fails; not every one can be checked.'];
  process.stdout.write(`\n${words[status]}\n`);
}
process.exit(status);
