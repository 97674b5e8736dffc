import { useRef } from 'react';

/** Remembers what had the focus when a dialog opened, and gives it back when the dialog closes. */
export function useReturnFocus() {
  const opener = useRef<Element | null>(null);
  return {
    remember: () => {
      opener.current = document.activeElement;
    },
    giveBack: (event: Event) => {
      if (!(opener.current instanceof HTMLElement) || !opener.current.isConnected) return;
      event.preventDefault();
      opener.current.focus();
    },
  };
}
