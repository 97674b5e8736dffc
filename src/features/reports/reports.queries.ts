import { queryOptions } from '@tanstack/react-query';
import type { QueryOf } from '#shared/contracts/endpoint.ts';
import { reportsApi } from '#shared/contracts/reports.ts';
import { call } from '../../lib/call.ts';

export type ReportListQuery = QueryOf<typeof reportsApi.list>;

export const reportQueries = {
  all: () => ['reports'] as const,
  list: (organisationId: string, query: ReportListQuery) =>
    queryOptions({
      queryKey: [...reportQueries.all(), 'list', organisationId, query],
      queryFn: ({ signal }) => call(reportsApi.list, { params: { organisationId }, query }, signal),
    }),
  /** A closed study does not change: its report is fetched once. */
  detail: (organisationId: string, studyId: string) =>
    queryOptions({
      queryKey: [...reportQueries.all(), 'detail', organisationId, studyId],
      queryFn: ({ signal }) => call(reportsApi.get, { params: { organisationId, id: studyId } }, signal),
      staleTime: Number.POSITIVE_INFINITY,
    }),
};
