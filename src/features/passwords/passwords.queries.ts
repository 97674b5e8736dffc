import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { linksApi, type PasswordChoice, type ResetRequest } from '#shared/contracts/links.ts';
import { call } from '../../lib/call.ts';

export const passwordQueries = {
  reset: (token: string) =>
    queryOptions({
      queryKey: ['passwords', 'reset', token],
      queryFn: ({ signal }) => call(linksApi.lookAtReset, { body: { token } }, signal),
    }),
};

export function useAskForReset() {
  return useMutation({ mutationFn: (body: ResetRequest) => call(linksApi.askForReset, { body }) });
}

/** Ends every sign-in of the person, so that nothing of them may stay in this browser either. */
export function useResetPassword() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: PasswordChoice) => call(linksApi.resetPassword, { body }),
    onSuccess: () => client.clear(),
  });
}
