import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { BodyInput, QueryOf } from '#shared/contracts/endpoint.ts';
import { signingKeysApi } from '#shared/contracts/signing-keys.ts';
import { call } from '../../lib/call.ts';

export type KeyListQuery = QueryOf<typeof signingKeysApi.list>;

export const signingKeyQueries = {
  all: () => ['signing-keys'] as const,
  list: (organisationId: string, query: KeyListQuery) =>
    queryOptions({
      queryKey: [...signingKeyQueries.all(), organisationId, query],
      queryFn: ({ signal }) => call(signingKeysApi.list, { params: { organisationId }, query }, signal),
    }),
};

export function useRotateKey(organisationId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: BodyInput<typeof signingKeysApi.rotate>) =>
      call(signingKeysApi.rotate, { params: { organisationId }, body }),
    // Also where another owner was faster: the list must show whose key it is now.
    onSettled: () => client.invalidateQueries({ queryKey: signingKeyQueries.all() }),
  });
}
