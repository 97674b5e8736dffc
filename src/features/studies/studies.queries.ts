import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { QueryOf } from '#shared/contracts/endpoint.ts';
import { type StudyDraft, studiesApi } from '#shared/contracts/studies.ts';
import { call } from '../../lib/call.ts';

export type StudyListQuery = QueryOf<typeof studiesApi.list>;

const followingMs = 15_000;

export const studyQueries = {
  all: () => ['studies'] as const,
  list: (organisationId: string, query: StudyListQuery) =>
    queryOptions({
      queryKey: [...studyQueries.all(), 'list', organisationId, query],
      queryFn: ({ signal }) => call(studiesApi.list, { params: { organisationId }, query }, signal),
    }),
  detail: (organisationId: string, id: string) =>
    queryOptions({
      queryKey: [...studyQueries.all(), 'detail', organisationId, id],
      queryFn: ({ signal }) => call(studiesApi.get, { params: { organisationId, id } }, signal),
      // While sessions are held somebody may be watching how far they are.
      // After sealing the token of the seal is on its way.
      refetchInterval: ({ state: { data } }) =>
        data?.state === 'collecting' || data?.sealed?.signed?.token === null ? followingMs : false,
    }),
};

/** Refetches everything about studies once an action has gone through. */
function useRefresh() {
  const client = useQueryClient();
  return () => client.invalidateQueries({ queryKey: studyQueries.all() });
}

export function useCreateStudy(organisationId: string) {
  const onSuccess = useRefresh();
  return useMutation({
    mutationFn: (body: StudyDraft) => call(studiesApi.create, { params: { organisationId }, body }),
    onSuccess,
  });
}

export function useUpdateStudy(organisationId: string, id: string) {
  const onSuccess = useRefresh();
  return useMutation({
    mutationFn: (body: StudyDraft) => call(studiesApi.update, { params: { organisationId, id }, body }),
    onSuccess,
  });
}

/** The list alone is refetched: the study itself is gone, and its page is about to be left. */
export function useDiscardStudy(organisationId: string, id: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => call(studiesApi.discard, { params: { organisationId, id } }),
    onSuccess: () => client.invalidateQueries({ queryKey: [...studyQueries.all(), 'list'] }),
  });
}

/** What follows is told to the mutation itself: the button that began it goes as soon as the study is refetched. */
export function useSealStudy(organisationId: string, id: string, onSealed: () => void) {
  const refresh = useRefresh();
  return useMutation({
    mutationFn: () => call(studiesApi.seal, { params: { organisationId, id }, body: {} }),
    onSuccess: () => {
      onSealed();
      return refresh();
    },
  });
}

export function usePreviewAmendment(organisationId: string, id: string) {
  return useMutation({
    mutationFn: (body: StudyDraft) => call(studiesApi.previewAmendment, { params: { organisationId, id }, body }),
  });
}

export function useAmendStudy(organisationId: string, id: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: { draft: StudyDraft; reason: string; amends: number }) =>
      call(studiesApi.amend, { params: { organisationId, id }, body }),
    // Sessions and codes follow the new version.
    onSuccess: () => client.invalidateQueries(),
  });
}

export function useDeviate(organisationId: string, id: string) {
  const onSuccess = useRefresh();
  return useMutation({
    mutationFn: (text: string) => call(studiesApi.deviate, { params: { organisationId, id }, body: { text } }),
    onSuccess,
  });
}

/** As with sealing, what follows outlives the button. */
export function useCloseStudy(organisationId: string, id: string, onClosed: () => void) {
  const refresh = useRefresh();
  return useMutation({
    mutationFn: (reason: string) => call(studiesApi.close, { params: { organisationId, id }, body: { reason } }),
    onSuccess: () => {
      onClosed();
      return refresh();
    },
  });
}
