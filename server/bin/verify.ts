import { readFileSync } from 'node:fs';
import { fileDigest } from '#shared/ledger/digest.ts';
import { checksOfFile } from '#shared/ledger/verify.ts';

// npm run verify <file>: the checks of a downloaded publication, offline, by the code that the public page runs.

function textOf(bytes: Uint8Array): string | null {
  try {
    return new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(bytes);
  } catch {
    return null;
  }
}

const [file] = process.argv.slice(2);
if (file === undefined) {
  process.stderr.write('Say which file: npm run verify -- fairlead-1a2b3c4d.json\n');
  process.exit(2);
}
const bytes = readFileSync(file);
process.stdout.write(`SHA-256 ${fileDigest(bytes)}\n\n`);
const checks = [...checksOfFile(textOf(bytes))];
for (const { name, outcome, reason } of checks) process.stdout.write(`${outcome.padEnd(14)}${name}: ${reason}\n`);
process.exit(checks.every(({ outcome }) => outcome === 'pass') ? 0 : 1);
