import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { type ObserverDraft, observersApi } from '#shared/contracts/observers.ts';
import { call } from '../../lib/call.ts';

export const observerQueries = {
  all: () => ['observers'] as const,
  list: (organisationId: string, sessionId: string) =>
    queryOptions({
      queryKey: [...observerQueries.all(), organisationId, sessionId],
      queryFn: ({ signal }) => call(observersApi.list, { params: { organisationId, id: sessionId } }, signal),
    }),
};

function useRefreshAll() {
  const client = useQueryClient();
  return () => client.invalidateQueries({ queryKey: observerQueries.all() });
}

export function usePlanObserver(organisationId: string, sessionId: string) {
  const onSuccess = useRefreshAll();
  return useMutation({
    mutationFn: (body: ObserverDraft) => call(observersApi.plan, { params: { organisationId, id: sessionId }, body }),
    onSuccess,
  });
}

export function useWithdrawObserver(organisationId: string) {
  const onSuccess = useRefreshAll();
  return useMutation({
    mutationFn: (id: string) => call(observersApi.withdraw, { params: { organisationId, id } }),
    onSuccess,
  });
}
