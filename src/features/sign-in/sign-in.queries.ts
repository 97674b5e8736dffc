import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { type Credentials, signInApi } from '#shared/contracts/sign-in.ts';
import { call } from '../../lib/call.ts';

export const signInQueries = {
  all: () => ['sign-in'] as const,
  /** Who is signed in. It changes only by signing in or out. */
  me: () =>
    queryOptions({
      queryKey: [...signInQueries.all(), 'me'],
      queryFn: ({ signal }) => call(signInApi.me, {}, signal),
      staleTime: Number.POSITIVE_INFINITY,
    }),
};

export function useSignIn() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: Credentials) => call(signInApi.signIn, { body }),
    onSuccess: () => client.removeQueries({ queryKey: signInQueries.all() }),
  });
}

export function useSignOut() {
  return useMutation({ mutationFn: () => call(signInApi.signOut, {}) });
}

export function useSignOutEverywhere() {
  return useMutation({ mutationFn: () => call(signInApi.signOutEverywhere, {}) });
}
