import { queryOptions } from '@tanstack/react-query';
import { exposureApi } from '#shared/contracts/exposure.ts';
import { call } from '../../lib/call.ts';

export const exposureQueries = {
  all: () => ['exposure'] as const,
  /** @param tenthsDba what is recorded now, so that another level is asked about anew */
  ofSession: (organisationId: string, id: string, tenthsDba: number | null) =>
    queryOptions({
      queryKey: [...exposureQueries.all(), organisationId, id, tenthsDba],
      queryFn: ({ signal }) => call(exposureApi.get, { params: { organisationId, id } }, signal),
    }),
};
