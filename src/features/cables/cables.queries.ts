import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { type CableDraft, cablesApi, type SpecimenDraft } from '#shared/contracts/cables.ts';
import type { QueryOf } from '#shared/contracts/endpoint.ts';
import { call } from '../../lib/call.ts';

export type CableListQuery = QueryOf<typeof cablesApi.list>;

export const cableQueries = {
  all: () => ['cables'] as const,
  list: (organisationId: string, query: CableListQuery) =>
    queryOptions({
      queryKey: [...cableQueries.all(), 'list', organisationId, query],
      queryFn: ({ signal }) => call(cablesApi.list, { params: { organisationId }, query }, signal),
    }),
  /** What a study can choose from. */
  choices: (organisationId: string) =>
    queryOptions({
      queryKey: [...cableQueries.all(), 'choices', organisationId],
      queryFn: ({ signal }) => call(cablesApi.choices, { params: { organisationId } }, signal),
    }),
  detail: (organisationId: string, id: string) =>
    queryOptions({
      queryKey: [...cableQueries.all(), 'detail', organisationId, id],
      queryFn: ({ signal }) => call(cablesApi.get, { params: { organisationId, id } }, signal),
    }),
};

function useRefresh() {
  const client = useQueryClient();
  return () => client.invalidateQueries({ queryKey: cableQueries.all() });
}

export function useCreateCable(organisationId: string) {
  const onSuccess = useRefresh();
  return useMutation({
    mutationFn: (body: CableDraft) => call(cablesApi.create, { params: { organisationId }, body }),
    onSuccess,
  });
}

export function useImportCables(organisationId: string) {
  const refresh = useRefresh();
  return useMutation({
    mutationFn: ({ file, isTrial }: { file: File; isTrial: boolean }) =>
      call(cablesApi.importAll, { params: { organisationId }, body: { isTrial }, file }),
    onSuccess: (_, { isTrial }) => (isTrial ? undefined : refresh()),
  });
}

export function useUpdateCable(organisationId: string, id: string) {
  const onSuccess = useRefresh();
  return useMutation({
    mutationFn: (body: CableDraft) => call(cablesApi.update, { params: { organisationId, id }, body }),
    onSuccess,
  });
}

export function useArchiveCable(organisationId: string, id: string) {
  const onSuccess = useRefresh();
  return useMutation({
    mutationFn: (archived: boolean) => call(cablesApi.archive, { params: { organisationId, id }, body: { archived } }),
    onSuccess,
  });
}

export function useAddSpecimen(organisationId: string, id: string) {
  const onSuccess = useRefresh();
  return useMutation({
    mutationFn: (body: SpecimenDraft) => call(cablesApi.addSpecimen, { params: { organisationId, id }, body }),
    onSuccess,
  });
}

export function useUpdateSpecimen(organisationId: string, id: string, specimenId: string) {
  const onSuccess = useRefresh();
  return useMutation({
    mutationFn: (body: SpecimenDraft) =>
      call(cablesApi.updateSpecimen, { params: { organisationId, id, specimenId }, body }),
    onSuccess,
  });
}

type SpecimenArchiving = { specimenId: string; archived: boolean };

export function useArchiveSpecimen(organisationId: string, id: string) {
  const onSuccess = useRefresh();
  return useMutation({
    mutationFn: ({ specimenId, archived }: SpecimenArchiving) =>
      call(cablesApi.archiveSpecimen, { params: { organisationId, id, specimenId }, body: { archived } }),
    onSuccess,
  });
}
