import { createRoot } from 'react-dom/client';
import { Listener } from './listener.tsx';

/** The listener's phone. Not in React's strict mode, which would open every seat twice during development. */
export function start(root: HTMLElement): void {
  createRoot(root).render(<Listener />);
}
