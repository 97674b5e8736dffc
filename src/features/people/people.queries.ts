import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type { QueryOf, Role } from '#shared/contracts/endpoint.ts';
import { type InvitationDraft, peopleApi } from '#shared/contracts/people.ts';
import { call } from '../../lib/call.ts';

export type PeopleListQuery = QueryOf<typeof peopleApi.list>;
export type InvitationListQuery = QueryOf<typeof peopleApi.invitations>;

export const peopleQueries = {
  all: () => ['people'] as const,
  list: (organisationId: string, query: PeopleListQuery) =>
    queryOptions({
      queryKey: [...peopleQueries.all(), 'list', organisationId, query],
      queryFn: ({ signal }) => call(peopleApi.list, { params: { organisationId }, query }, signal),
    }),
  invitations: (organisationId: string, query: InvitationListQuery) =>
    queryOptions({
      queryKey: [...peopleQueries.all(), 'invitations', organisationId, query],
      queryFn: ({ signal }) => call(peopleApi.invitations, { params: { organisationId }, query }, signal),
    }),
};

/** Members are also offered as proctors and code holders, and mail tells of every change. */
function useRefreshAll() {
  const client = useQueryClient();
  return () => client.invalidateQueries();
}

export function useChangeRole(organisationId: string) {
  const onSuccess = useRefreshAll();
  return useMutation({
    mutationFn: ({ id, role }: { id: string; role: Role }) =>
      call(peopleApi.changeRole, { params: { organisationId, id }, body: { role } }),
    onSuccess,
  });
}

export function useRemoveMember(organisationId: string) {
  const onSuccess = useRefreshAll();
  return useMutation({
    mutationFn: (id: string) => call(peopleApi.remove, { params: { organisationId, id } }),
    onSuccess,
  });
}

export function useInvite(organisationId: string) {
  const onSuccess = useRefreshAll();
  return useMutation({
    mutationFn: (body: InvitationDraft) => call(peopleApi.invite, { params: { organisationId }, body }),
    onSuccess,
  });
}

export function useInviteAgain(organisationId: string) {
  const onSuccess = useRefreshAll();
  return useMutation({
    mutationFn: (id: string) => call(peopleApi.inviteAgain, { params: { organisationId, id } }),
    onSuccess,
  });
}

export function useWithdraw(organisationId: string) {
  const onSuccess = useRefreshAll();
  return useMutation({
    mutationFn: (id: string) => call(peopleApi.withdraw, { params: { organisationId, id } }),
    onSuccess,
  });
}
