import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { attendancesApi } from '#shared/contracts/attendances.ts';
import type { QueryOf } from '#shared/contracts/endpoint.ts';
import { call } from '../../lib/call.ts';

export type AttendanceListQuery = QueryOf<typeof attendancesApi.list>;

export const attendanceQueries = {
  all: () => ['attendances'] as const,
  list: (organisationId: string, sessionId: string, query: AttendanceListQuery) =>
    queryOptions({
      queryKey: [...attendanceQueries.all(), organisationId, sessionId, query],
      queryFn: ({ signal }) => call(attendancesApi.list, { params: { organisationId, id: sessionId }, query }, signal),
      // Listeners answer while this page is open.
      refetchInterval: 15_000,
    }),
};

/** Everything about invitations writes mail too. */
function useRefreshAll() {
  const client = useQueryClient();
  return () => client.invalidateQueries();
}

export function useInviteListeners(organisationId: string, sessionId: string) {
  const onSuccess = useRefreshAll();
  return useMutation({
    mutationFn: (addresses: string) =>
      call(attendancesApi.invite, { params: { organisationId, id: sessionId }, body: { addresses } }),
    onSuccess,
  });
}

export type AttendanceAct = 'sendAgain' | 'withdraw' | 'erase';

export function useAttendanceAct(organisationId: string, id: string) {
  const onSuccess = useRefreshAll();
  return useMutation({
    mutationFn: (act: AttendanceAct) => call(attendancesApi[act], { params: { organisationId, id } }),
    onSuccess,
  });
}
