import { Outlet, ScrollRestoration } from 'react-router-dom';
import { ToastProvider } from '../ui/toast.tsx';
import { Opening } from './opening.tsx';
import { useArrival } from './use-arrival.ts';

/** Around everything: news, where a page is scrolled to, and where the focus goes. */
export function Root() {
  useArrival();
  return (
    <ToastProvider>
      <Opening />
      <Outlet />
      <ScrollRestoration />
    </ToastProvider>
  );
}
