import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { QueryOf } from '#shared/contracts/endpoint.ts';
import { type PublicationDraft, publicationsApi } from '#shared/contracts/publications.ts';
import { call } from '../../lib/call.ts';

export type PublicationListQuery = Partial<QueryOf<typeof publicationsApi.list>>;

export const publicationQueries = {
  all: () => ['publications'] as const,
  list: (query: PublicationListQuery) =>
    queryOptions({
      queryKey: [...publicationQueries.all(), 'list', query],
      queryFn: ({ signal }) => call(publicationsApi.list, { query }, signal),
    }),
  detail: (id: string) =>
    queryOptions({
      queryKey: [...publicationQueries.all(), 'detail', id],
      queryFn: ({ signal }) => call(publicationsApi.get, { params: { id } }, signal),
    }),
  ofStudy: (organisationId: string, id: string) =>
    queryOptions({
      queryKey: [...publicationQueries.all(), 'of-study', organisationId, id],
      queryFn: ({ signal }) => call(publicationsApi.ofStudy, { params: { organisationId, id } }, signal),
    }),
};

/** A study's state changes with what is done about its publication, so everything that was fetched is asked for again. */
function useRefresh() {
  const client = useQueryClient();
  return () => client.invalidateQueries();
}

export function usePublish(organisationId: string, id: string) {
  const onSuccess = useRefresh();
  return useMutation({
    mutationFn: (body: PublicationDraft) => call(publicationsApi.publish, { params: { organisationId, id }, body }),
    onSuccess,
  });
}

export function useWithdraw(organisationId: string, id: string) {
  const onSuccess = useRefresh();
  return useMutation({
    mutationFn: (reason: string) =>
      call(publicationsApi.withdraw, { params: { organisationId, id }, body: { reason } }),
    onSuccess,
  });
}

export function useShelve(organisationId: string, id: string) {
  const onSuccess = useRefresh();
  return useMutation({
    mutationFn: (reason: string) => call(publicationsApi.shelve, { params: { organisationId, id }, body: { reason } }),
    onSuccess,
  });
}
