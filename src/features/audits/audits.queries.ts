import { queryOptions } from '@tanstack/react-query';
import { auditsApi } from '#shared/contracts/audits.ts';
import { call } from '../../lib/call.ts';

export const auditQueries = {
  all: () => ['audits'] as const,
  latest: (organisationId: string) =>
    queryOptions({
      queryKey: [...auditQueries.all(), organisationId],
      queryFn: ({ signal }) => call(auditsApi.latest, { params: { organisationId } }, signal),
    }),
};
