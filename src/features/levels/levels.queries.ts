import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { type LevelsDraft, levelsApi } from '#shared/contracts/levels.ts';
import { call } from '../../lib/call.ts';

export const levelQueries = {
  all: () => ['levels'] as const,
  ofSession: (organisationId: string, id: string, asProctor: boolean) =>
    queryOptions({
      queryKey: [...levelQueries.all(), organisationId, id, asProctor],
      queryFn: ({ signal }) =>
        call(levelsApi.get, { params: { organisationId, id }, query: { asProctor: asProctor ? 'yes' : 'no' } }, signal),
    }),
};

function useRefresh() {
  const client = useQueryClient();
  return () => client.invalidateQueries({ queryKey: levelQueries.all() });
}

export function useRecordLevels(organisationId: string, id: string) {
  const onSuccess = useRefresh();
  return useMutation({
    mutationFn: (body: LevelsDraft) => call(levelsApi.record, { params: { organisationId, id }, body }),
    onSuccess,
  });
}

export function useAssignMeasurer(organisationId: string, id: string) {
  const onSuccess = useRefresh();
  return useMutation({
    mutationFn: (userId: string) => call(levelsApi.assign, { params: { organisationId, id }, body: { userId } }),
    onSuccess,
  });
}
