import { useEffect } from 'react';

/** Names the window after the page, the page's own words first. */
export function useDocumentTitle(title: string) {
  useEffect(() => {
    document.title = title === '' ? 'Fairlead' : `${title} · Fairlead`;
  }, [title]);
}
