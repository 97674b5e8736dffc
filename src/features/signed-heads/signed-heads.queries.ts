import { queryOptions } from '@tanstack/react-query';
import { signedHeadsApi } from '#shared/contracts/signed-heads.ts';
import { call } from '../../lib/call.ts';

const everyMs = 10_000;

export const signedHeadQueries = {
  all: () => ['signed-heads'] as const,
  time: (organisationId: string) =>
    queryOptions({
      queryKey: [...signedHeadQueries.all(), 'time', organisationId],
      queryFn: ({ signal }) => call(signedHeadsApi.time, { params: { organisationId } }, signal),
      refetchInterval: everyMs,
    }),
};
