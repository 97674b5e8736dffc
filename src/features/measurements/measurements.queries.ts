import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { QueryOf } from '#shared/contracts/endpoint.ts';
import { type MeasurementDraft, measurementsApi } from '#shared/contracts/measurements.ts';
import { call } from '../../lib/call.ts';

export type MeasurementListQuery = QueryOf<typeof measurementsApi.list>;

export const measurementQueries = {
  all: () => ['measurements'] as const,
  list: (organisationId: string, id: string, query: MeasurementListQuery) =>
    queryOptions({
      queryKey: [...measurementQueries.all(), 'list', organisationId, id, query],
      queryFn: ({ signal }) => call(measurementsApi.list, { params: { organisationId, id }, query }, signal),
    }),
  curves: (organisationId: string, id: string) =>
    queryOptions({
      queryKey: [...measurementQueries.all(), 'curves', organisationId, id],
      queryFn: ({ signal }) => call(measurementsApi.curves, { params: { organisationId, id } }, signal),
    }),
  detail: (organisationId: string, id: string, measurementId: string) =>
    queryOptions({
      queryKey: [...measurementQueries.all(), 'detail', organisationId, id, measurementId],
      queryFn: ({ signal }) => call(measurementsApi.get, { params: { organisationId, id, measurementId } }, signal),
    }),
};

function useRefresh() {
  const client = useQueryClient();
  return () => client.invalidateQueries({ queryKey: measurementQueries.all() });
}

export type NewMeasurement = { specimenId: string; draft: MeasurementDraft; file: File | null };

export function useAddMeasurement(organisationId: string, id: string) {
  const onSuccess = useRefresh();
  return useMutation({
    mutationFn: ({ specimenId, draft, file }: NewMeasurement) =>
      call(measurementsApi.add, {
        params: { organisationId, id, specimenId },
        body: draft,
        ...(file === null ? {} : { file }),
      }),
    onSuccess,
  });
}

export function useStrikeMeasurement(organisationId: string, id: string, measurementId: string) {
  const onSuccess = useRefresh();
  return useMutation({
    mutationFn: (reason: string) =>
      call(measurementsApi.strike, { params: { organisationId, id, measurementId }, body: { reason } }),
    onSuccess,
  });
}
