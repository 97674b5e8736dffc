import { bundleCheckNames, nameOfCheck } from '../ledger/check-names.ts';
import type { WebCrypto } from '../ledger/token-signature.ts';
import { type Check, recordSteps, runStep, type Step, unreadable } from '../ledger/verify.ts';
import { type BundleReading, openBundle } from './bundle-reading.ts';
import { checkDrawTime, checkPublished, checkSealingTime, checkSignatures } from './check-proof.ts';
import { checkRegistry } from './check-registry.ts';
import { checkTables } from './check-tables.ts';

/** The checks that need more than the record. */
const bundleSteps: readonly Step<BundleReading>[] = [
  { id: 'published', restsOn: ['record'], run: checkPublished },
  { id: 'signatures', restsOn: ['record', 'published'], run: checkSignatures },
  { id: 'sealingTime', restsOn: ['record', 'signatures', 'protocol'], run: checkSealingTime },
  { id: 'drawTime', restsOn: ['record', 'signatures'], run: checkDrawTime },
  { id: 'tables', restsOn: ['record', 'protocol', 'draws', 'answers', 'figures'], run: checkTables },
  { id: 'registry', restsOn: ['record', 'protocol', 'signatures'], run: checkRegistry },
];

function run(id: Check['id'], bundle: BundleReading, done: readonly Check[]): Check {
  const ofRecord = recordSteps.find((step) => step.id === id);
  if (ofRecord !== undefined) return runStep(ofRecord, bundle.study, done);
  const own = bundleSteps.find((step) => step.id === id);
  if (own === undefined) throw new RangeError(`there is no check ${id}`);
  return runStep(own, bundle, done);
}

/**
 * Checks a bundle, one line per check with its reason in plain words. The one code for the server, a browser and the command
 * line.
 *
 * @param bytes  the file
 * @param crypto `globalThis.crypto`, or null where there is none; only tokens need it
 */
export async function* checksOfBundle(bytes: Uint8Array, crypto: WebCrypto | null): AsyncGenerator<Check> {
  const opened = await openBundle(bytes, crypto);
  if ('fault' in opened) {
    yield* unreadable(opened.fault, bundleCheckNames);
    return;
  }
  const { bundle } = opened;
  const done: Check[] = [
    {
      id: 'file',
      name: nameOfCheck('file'),
      outcome: 'pass',
      reason: `${bundle.files.size} files, each in the form that it must have.`,
    },
  ];
  yield* done;
  for (const { id } of bundleCheckNames.slice(1)) {
    const check = run(id, bundle, done);
    done.push(check);
    yield check;
  }
}
