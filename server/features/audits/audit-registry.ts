import { treeRoot } from '#shared/ledger/merkle.ts';
import { sealedVersions } from '#shared/ledger/protocol-versions.ts';
import { registryHeadFault, registryLeafHash } from '#shared/ledger/registry.ts';
import type { Tx } from '../../db/transaction.ts';
import { readKinds } from '../../ledger/ledger.ts';
import { leavesOf, registryHeadsOf } from '../../ledger/registry-log.ts';
import { keysOf, publicKeyView } from '../../ledger/signing-keys.ts';
import { recordedStudies } from './audits.store.ts';

/**
 * The first break of an organisation's registry, in words; null when every entry is what a record sealed, every sealing
 * is entered, and every head was signed over the entries of then.
 *
 * @param broken studies whose records do not hold, which is told of them already: nothing is compared with those
 */
export async function registryFault(tx: Tx, organisationId: string, broken: readonly string[]): Promise<string | null> {
  const leaves = await leavesOf(tx, organisationId);
  for (const [place, { index, hash, studyId, version, digest, sealedAt }] of leaves.entries()) {
    if (index !== place) return `entry ${place + 1} is gone`;
    if (registryLeafHash({ study: studyId, version, digest, sealedAt }) !== hash)
      return `entry ${place + 1} does not match its hash`;
  }
  for (const study of await recordedStudies(tx, organisationId)) {
    if (broken.includes(study)) continue;
    const sealings = await readKinds(tx, study, ['protocol-sealed', 'protocol-amended']);
    const entered = leaves.filter(({ studyId }) => studyId === study);
    for (const { version, digest } of sealedVersions(sealings))
      if (!entered.some((leaf) => leaf.version === version && leaf.digest === digest))
        return `version ${version} of study ${study} is sealed and not entered`;
    if (entered.length > sealings.length) return `a version of study ${study} is entered and was never sealed`;
  }
  const keys = (await keysOf(tx, organisationId)).map(publicKeyView);
  const heads = await registryHeadsOf(tx, organisationId);
  for (const head of heads) {
    const why = registryHeadFault(head, keys);
    if (why !== null) return `its head over ${head.size} entries does not hold: ${why}`;
    if (treeRoot(leaves.slice(0, head.size).map(({ hash }) => hash)) !== head.root)
      return `the first ${head.size} entries are not those of the head that was signed over them`;
  }
  if ((heads.at(-1)?.size ?? 0) !== leaves.length) return `its last head is not over all ${leaves.length} entries`;
  return null;
}
