import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { QueryOf } from '#shared/contracts/endpoint.ts';
import { rehearsalsApi } from '#shared/contracts/rehearsals.ts';
import { type SessionDraft, type SessionMove, sessionsApi } from '#shared/contracts/sessions.ts';
import { call } from '../../lib/call.ts';

export type SessionListQuery = QueryOf<typeof sessionsApi.list>;

export const sessionQueries = {
  all: () => ['sessions'] as const,
  list: (organisationId: string, query: SessionListQuery) =>
    queryOptions({
      queryKey: [...sessionQueries.all(), 'list', organisationId, query],
      queryFn: ({ signal }) => call(sessionsApi.list, { params: { organisationId }, query }, signal),
    }),
  detail: (organisationId: string, id: string) =>
    queryOptions({
      queryKey: [...sessionQueries.all(), 'detail', organisationId, id],
      queryFn: ({ signal }) => call(sessionsApi.get, { params: { organisationId, id } }, signal),
    }),
};

export function useBeginRehearsal(organisationId: string) {
  return useMutation({
    mutationFn: (sessionId: string | null) =>
      call(rehearsalsApi.begin, { params: { organisationId }, body: { sessionId } }),
  });
}

export function usePlanSession(organisationId: string, studyId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: SessionDraft) => call(sessionsApi.plan, { params: { organisationId, id: studyId }, body }),
    onSuccess: () => client.invalidateQueries({ queryKey: sessionQueries.all() }),
  });
}

/** Whoever is invited is told and asked anew, so that everything shown of the session may have changed. */
function useRefreshAll() {
  const client = useQueryClient();
  return () => client.invalidateQueries();
}

export function useMoveSession(organisationId: string, id: string) {
  const onSuccess = useRefreshAll();
  return useMutation({
    mutationFn: (body: SessionMove) => call(sessionsApi.move, { params: { organisationId, id }, body }),
    onSuccess,
  });
}

export function useCancelSession(organisationId: string, id: string) {
  const onSuccess = useRefreshAll();
  return useMutation({
    mutationFn: (reason: string) => call(sessionsApi.cancel, { params: { organisationId, id }, body: { reason } }),
    onSuccess,
  });
}
