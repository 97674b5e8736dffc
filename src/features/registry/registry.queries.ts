import { queryOptions } from '@tanstack/react-query';
import { type RegistryHead, type RegistryListQuery, registryApi } from '#shared/contracts/registry.ts';
import { growthFault, inclusionFault, type KeptFile, registryHeadFault } from '#shared/ledger/registry.ts';
import { call } from '../../lib/call.ts';

export const registryQueries = {
  list: (organisationId: string, query: Partial<RegistryListQuery>) =>
    queryOptions({
      queryKey: ['registry', organisationId, query],
      queryFn: ({ signal }) => call(registryApi.list, { params: { organisationId }, query }, signal),
    }),
};

/** What became of a kept file: of which kind it is, against which head it was held, and what is wrong, if anything. */
export type KeptOutcome = {
  readonly kept: KeptFile;
  readonly now: RegistryHead;
  readonly fault: { readonly where: 'file' | 'registry'; readonly why: string } | null;
};

/**
 * Holds a kept head or entry against the registry as it is now. All that the server gives is proofs and names of keys;
 * whether they hold is found here.
 *
 * @throws Problem when the registry cannot be asked
 */
export async function checkKept(organisationId: string, kept: KeptFile): Promise<KeptOutcome> {
  const params = { organisationId };
  const [now, { keys }] = await Promise.all([call(registryApi.head, { params }), call(registryApi.keys, { params })]);
  const outcome = (where: 'file' | 'registry', why: string | null): KeptOutcome => ({
    kept,
    now,
    fault: why === null ? null : { where, why },
  });
  const { head } = kept;
  if (head.organisation !== organisationId) return outcome('file', 'it is that of another organisation');
  const untrusted = registryHeadFault(head, keys) ?? (kept.kind === 'entry' ? inclusionFault(kept) : null);
  if (untrusted !== null) return outcome('file', untrusted);
  const unsigned = registryHeadFault(now, keys);
  if (unsigned !== null) return outcome('registry', unsigned);
  const proof =
    head.size < now.size
      ? await call(registryApi.consistency, { params, query: { first: head.size, second: now.size } })
      : null;
  return outcome('registry', growthFault(head, now, proof));
}
