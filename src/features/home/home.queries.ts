import { queryOptions } from '@tanstack/react-query';
import { usersApi } from '#shared/contracts/users.ts';
import { call } from '../../lib/call.ts';

export const homeQueries = {
  all: () => ['home'] as const,
  /** What waits for a person is changed from everywhere, so a home that is opened asks again. */
  waiting: (organisationId: string) =>
    queryOptions({
      queryKey: [...homeQueries.all(), 'waiting', organisationId],
      queryFn: ({ signal }) => call(usersApi.waiting, { params: { organisationId } }, signal),
      staleTime: 0,
    }),
};
