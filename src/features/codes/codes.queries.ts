import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { codesApi } from '#shared/contracts/codes.ts';
import { call } from '../../lib/call.ts';

export const codesQueries = {
  all: () => ['codes'] as const,
  status: (organisationId: string, studyId: string) =>
    queryOptions({
      queryKey: [...codesQueries.all(), 'status', organisationId, studyId],
      queryFn: ({ signal }) => call(codesApi.status, { params: { organisationId, id: studyId } }, signal),
    }),
};

function useRefresh() {
  const client = useQueryClient();
  return () => client.invalidateQueries({ queryKey: codesQueries.all() });
}

export function useDrawCodes(organisationId: string, studyId: string) {
  const onSuccess = useRefresh();
  return useMutation({
    mutationFn: () => call(codesApi.draw, { params: { organisationId, id: studyId }, body: {} }),
    onSuccess,
  });
}

/** The sheet is held by the page that opened it and by nothing else: it is forgotten as soon as that page is left. */
export function useOpenCodes(organisationId: string, studyId: string) {
  const onSuccess = useRefresh();
  return useMutation({
    gcTime: 0,
    mutationFn: (purpose: 'labels' | 'check') =>
      call(codesApi.open, { params: { organisationId, id: studyId }, body: { purpose } }),
    onSuccess,
  });
}

export function useConfirmCodes(organisationId: string, studyId: string) {
  const onSuccess = useRefresh();
  return useMutation({
    mutationFn: () => call(codesApi.confirm, { params: { organisationId, id: studyId }, body: {} }),
    onSuccess,
  });
}
