import { QueryClientProvider } from '@tanstack/react-query';
import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { createBrowserRouter, RouterProvider } from 'react-router-dom';
import { onSignedOut, queryClient } from '../lib/query-client.ts';
import { paths } from './paths.ts';
import { routes } from './routes.tsx';

/** The signed-in application. */
export function start(root: HTMLElement): void {
  const router = createBrowserRouter(routes);
  onSignedOut(() => {
    const { pathname, search } = router.state.location;
    if (pathname !== paths.signIn()) void router.navigate(paths.signIn(pathname + search));
  });
  const render = () =>
    createRoot(root).render(
      <StrictMode>
        <QueryClientProvider client={queryClient}>
          <RouterProvider router={router} />
        </QueryClientProvider>
      </StrictMode>,
    );
  // A page that came from the server ready to read stays until the application has the same page ready.
  if (root.childElementCount === 0 || router.state.initialized) {
    render();
    return;
  }
  const stop = router.subscribe(({ initialized }) => {
    if (!initialized) return;
    stop();
    render();
  });
}
