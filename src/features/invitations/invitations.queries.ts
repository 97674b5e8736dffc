import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { type InvitationAnswer, linksApi } from '#shared/contracts/links.ts';
import { call } from '../../lib/call.ts';

export const invitationQueries = {
  offer: (token: string) =>
    queryOptions({
      queryKey: ['invitations', 'offer', token],
      queryFn: ({ signal }) => call(linksApi.lookAtInvitation, { body: { token } }, signal),
    }),
};

/** Whoever joins is somebody else to every page: what was known before is forgotten. */
function useForget() {
  const client = useQueryClient();
  return () => client.clear();
}

export function useAcceptInvitation() {
  const onSuccess = useForget();
  return useMutation({
    mutationFn: (body: InvitationAnswer) => call(linksApi.acceptInvitation, { body }),
    onSuccess,
  });
}

export function useJoinByInvitation() {
  const onSuccess = useForget();
  return useMutation({
    mutationFn: (token: string) => call(linksApi.joinByInvitation, { body: { token } }),
    onSuccess,
  });
}
