import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { QueryOf } from '#shared/contracts/endpoint.ts';
import { rigPresetsApi } from '#shared/contracts/rig-presets.ts';
import type { RigPreset } from '#shared/protocol/rig-preset.ts';
import { call } from '../../lib/call.ts';

export type PresetListQuery = QueryOf<typeof rigPresetsApi.list>;

export const rigPresetQueries = {
  all: () => ['rig-presets'] as const,
  list: (organisationId: string, query: PresetListQuery) =>
    queryOptions({
      queryKey: [...rigPresetQueries.all(), 'list', organisationId, query],
      queryFn: ({ signal }) => call(rigPresetsApi.list, { params: { organisationId }, query }, signal),
    }),
  /** What a study can choose from. */
  choices: (organisationId: string) =>
    queryOptions({
      queryKey: [...rigPresetQueries.all(), 'choices', organisationId],
      queryFn: ({ signal }) => call(rigPresetsApi.choices, { params: { organisationId } }, signal),
    }),
  detail: (organisationId: string, id: string) =>
    queryOptions({
      queryKey: [...rigPresetQueries.all(), 'detail', organisationId, id],
      queryFn: ({ signal }) => call(rigPresetsApi.get, { params: { organisationId, id } }, signal),
    }),
};

function useRefresh() {
  const client = useQueryClient();
  return () => client.invalidateQueries({ queryKey: rigPresetQueries.all() });
}

export function useCreatePreset(organisationId: string) {
  const onSuccess = useRefresh();
  return useMutation({
    mutationFn: (body: RigPreset) => call(rigPresetsApi.create, { params: { organisationId }, body }),
    onSuccess,
  });
}

export function useUpdatePreset(organisationId: string, id: string) {
  const onSuccess = useRefresh();
  return useMutation({
    mutationFn: (body: RigPreset) => call(rigPresetsApi.update, { params: { organisationId, id }, body }),
    onSuccess,
  });
}

export function useArchivePreset(organisationId: string, id: string) {
  const onSuccess = useRefresh();
  return useMutation({
    mutationFn: (archived: boolean) =>
      call(rigPresetsApi.archive, { params: { organisationId, id }, body: { archived } }),
    onSuccess,
  });
}
