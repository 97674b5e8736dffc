import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { evidenceApi } from '#shared/contracts/evidence.ts';
import { call } from '../../lib/call.ts';

export const evidenceQueries = {
  all: () => ['evidence'] as const,
  list: (organisationId: string, id: string) =>
    queryOptions({
      queryKey: [...evidenceQueries.all(), organisationId, id],
      queryFn: ({ signal }) => call(evidenceApi.list, { params: { organisationId, id } }, signal),
    }),
};

export function useAddEvidence(organisationId: string, id: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ rule, note, file }: { rule: string; note: string; file: File }) =>
      call(evidenceApi.add, { params: { organisationId, id }, body: { rule, note }, file }),
    onSuccess: () => client.invalidateQueries({ queryKey: evidenceQueries.all() }),
  });
}
