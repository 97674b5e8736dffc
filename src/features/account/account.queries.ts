import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { accountApi } from '#shared/contracts/account.ts';
import { call } from '../../lib/call.ts';

export const accountQueries = {
  all: () => ['account'] as const,
  places: () =>
    queryOptions({
      queryKey: [...accountQueries.all(), 'places'],
      queryFn: ({ signal }) => call(accountApi.places, {}, signal),
    }),
  attempts: (page: number) =>
    queryOptions({
      queryKey: [...accountQueries.all(), 'attempts', page],
      queryFn: ({ signal }) => call(accountApi.attempts, { query: { page } }, signal),
    }),
};

function useRefresh() {
  const client = useQueryClient();
  return () => client.invalidateQueries({ queryKey: accountQueries.all() });
}

export function useEndPlace() {
  const onSettled = useRefresh();
  return useMutation({ mutationFn: (id: string) => call(accountApi.endPlace, { params: { id } }), onSettled });
}

export function useEndOtherPlaces() {
  const onSettled = useRefresh();
  return useMutation({ mutationFn: () => call(accountApi.endOtherPlaces, {}), onSettled });
}
