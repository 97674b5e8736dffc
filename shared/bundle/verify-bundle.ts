import type { WebCrypto } from '../ledger/token-signature.ts';
import {
  type Check,
  fileName,
  checkNames as recordCheckNames,
  recordSteps,
  runStep,
  type Step,
} from '../ledger/verify.ts';
import { type BundleReading, openBundle } from './bundle-reading.ts';
import { checkDrawTime, checkPublished, checkSealingTime, checkSignatures } from './check-proof.ts';
import { checkTables } from './check-tables.ts';

/** The checks that need more than the record, each after the check of the record that it belongs behind. */
const bundleSteps: readonly (Step<BundleReading> & { readonly after: Check['id'] })[] = [
  { after: 'record', id: 'published', name: 'Published as the record says', restsOn: ['record'], run: checkPublished },
  {
    after: 'record',
    id: 'signatures',
    name: 'Signatures hold',
    restsOn: ['record', 'published'],
    run: checkSignatures,
  },
  {
    after: 'protocol',
    id: 'sealingTime',
    name: 'Protocol unchanged since its token',
    restsOn: ['record', 'signatures', 'protocol'],
    run: checkSealingTime,
  },
  {
    after: 'protocol',
    id: 'drawTime',
    name: 'Draws fixed, by their tokens, before the first trial',
    restsOn: ['record', 'signatures'],
    run: checkDrawTime,
  },
  {
    after: 'flow',
    id: 'tables',
    name: 'Tables equal the record',
    restsOn: ['record', 'protocol', 'draws', 'answers', 'figures'],
    run: checkTables,
  },
];

type AnyStep = { readonly id: Check['id']; readonly name: string; run(done: readonly Check[]): Check };

function stepsFor(bundle: BundleReading): AnyStep[] {
  return recordSteps.flatMap((step) => [
    { id: step.id, name: step.name, run: (done) => runStep(step, bundle.study, done) },
    ...bundleSteps
      .filter(({ after }) => after === step.id)
      .map((own): AnyStep => ({ id: own.id, name: own.name, run: (done) => runStep(own, bundle, done) })),
  ]);
}

/** Every check of a bundle by its name, in order, for a page that shows them before they have run. */
export const bundleCheckNames: readonly { readonly id: Check['id']; readonly name: string }[] =
  recordCheckNames.flatMap((one) => [
    one,
    ...bundleSteps.filter(({ after }) => after === one.id).map(({ id, name }) => ({ id, name })),
  ]);

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
    yield { id: 'file', name: fileName, outcome: 'fail', reason: opened.fault };
    const reason = `It rests on “${fileName}”, which did not pass.`;
    for (const { id, name } of bundleCheckNames.slice(1)) yield { id, name, outcome: 'not checkable', reason };
    return;
  }
  const { bundle } = opened;
  const done: Check[] = [];
  yield {
    id: 'file',
    name: fileName,
    outcome: 'pass',
    reason: `${bundle.files.size} files, each in the form that it must have.`,
  };
  for (const step of stepsFor(bundle)) {
    const check = step.run(done);
    done.push(check);
    yield check;
  }
}
