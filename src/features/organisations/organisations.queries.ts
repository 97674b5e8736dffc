import { queryOptions } from '@tanstack/react-query';
import { usersApi } from '#shared/contracts/users.ts';
import { call } from '../../lib/call.ts';

export const organisationQueries = {
  all: () => ['organisations'] as const,
  members: (organisationId: string) =>
    queryOptions({
      queryKey: [...organisationQueries.all(), 'members', organisationId],
      queryFn: ({ signal }) => call(usersApi.members, { params: { organisationId } }, signal),
    }),
};
