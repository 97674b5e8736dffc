import { sealedVersions } from '../ledger/protocol-versions.ts';
import { inclusionFault, registryHeadFault } from '../ledger/registry.ts';
import type { Verdict } from '../ledger/verify.ts';
import type { BundleReading } from './bundle-reading.ts';

/** The sealed protocol is an entry of the publisher's registry, under a head that one of its keys signed. */
export function checkRegistry(bundle: BundleReading): Verdict {
  const inclusion = bundle.inclusion();
  if (inclusion === null)
    return { faults: [], open: 'The bundle brings no proof that the protocol is in a registry.', held: '' };
  const { leaf, index, head, organisation } = inclusion;
  const sealed = sealedVersions(bundle.study.entries()).at(-1);
  const faults: string[] = [];
  if (sealed === undefined || leaf.study !== bundle.study.protocol().study || leaf.digest !== sealed.digest)
    faults.push('The registry’s entry is that of another protocol.');
  else if (leaf.version !== sealed.version || leaf.sealedAt !== sealed.at)
    faults.push('The registry’s entry tells another version, or another time of sealing, than the record.');
  const fault = inclusionFault(inclusion) ?? registryHeadFault(head, bundle.signed().keys);
  if (fault !== null) faults.push(`The registry: ${fault}.`);
  return {
    faults,
    held: `Entry ${index + 1} of ${head.size} in the registry ${organisation}; its page shows whether the log has only grown since.`,
  };
}
