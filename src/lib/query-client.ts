import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query';
import { Problem } from '#shared/problem.ts';

const mostRetries = 3;
const firstDelayMs = 500;
const longestDelayMs = 8_000;

type SignedOut = () => void;
let signedOut: SignedOut | null = null;

/** Says once for the whole application what happens when the server no longer knows who is asking. */
export function onSignedOut(listener: SignedOut): void {
  signedOut = listener;
}

const isSignedOut = (error: unknown) => error instanceof Problem && error.code === 'not-signed-in';

/** Only silence is worth asking again; what was refused once is refused twice. */
function isWorthRetrying(failures: number, error: unknown): boolean {
  const isSilence = error instanceof Problem && (error.code === 'unreachable' || error.code === 'unavailable');
  return isSilence && failures < mostRetries;
}

export const queryClient = new QueryClient({
  queryCache: new QueryCache({
    // A page that is still loading answers for itself: its error boundary knows where one was going.
    onError: (error, query) => {
      if (isSignedOut(error) && query.isActive()) signedOut?.();
    },
  }),
  mutationCache: new MutationCache({
    onError: (error) => {
      if (isSignedOut(error)) signedOut?.();
    },
  }),
  defaultOptions: {
    queries: {
      // A page that is opened shows what is known at once and asks again behind it.
      staleTime: 1_000,
      networkMode: 'always',
      retry: isWorthRetrying,
      retryDelay: (failures) => Math.min(firstDelayMs * 2 ** failures, longestDelayMs),
    },
    mutations: { networkMode: 'always', retry: false },
  },
});
