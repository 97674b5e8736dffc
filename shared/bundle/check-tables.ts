import { strFromU8 } from 'fflate';
import type { Verdict } from '../ledger/verify.ts';
import { derivedFiles } from './bundle-files.ts';
import type { BundleReading } from './bundle-reading.ts';
import { sameBytes } from './bytes.ts';

/** Every table and its description, made again from the record, are byte for byte what is here. */
export function checkTables(bundle: BundleReading): Verdict {
  const faults: string[] = [];
  const made = derivedFiles(bundle.study);
  for (const [name, bytes] of made) {
    const found = bundle.files.get(name);
    if (found === undefined) faults.push(`${name} is missing.`);
    else if (!sameBytes(found, bytes)) faults.push(`${name} differs from the record${placeOf(name, found, bytes)}.`);
  }
  for (const name of bundle.files.keys())
    if (name.endsWith('.csv') && !made.has(name)) faults.push(`${name} is no table of this record.`);
  return { faults, held: `${made.size} files, the same byte for byte when they are made again from the record.` };
}

/** The first line that differs, where there are lines. */
function placeOf(name: string, found: Uint8Array, made: Uint8Array): string {
  if (!name.endsWith('.csv')) return '';
  const [left, right] = [strFromU8(found).split('\r\n'), strFromU8(made).split('\r\n')];
  const line = right.findIndex((row, index) => row !== left[index]);
  return ` in line ${(line < 0 ? right.length : line) + 1}`;
}
