import { useEffect, useRef } from 'react';
import { useLocation } from 'react-router-dom';

/** Moves the focus to the main heading when another page has opened, so that keys and readers begin there. */
export function useArrival() {
  const { pathname } = useLocation();
  const shownPath = useRef(pathname);
  useEffect(() => {
    if (shownPath.current === pathname) return;
    shownPath.current = pathname;
    const heading = document.querySelector<HTMLElement>('main h1');
    if (heading === null) return;
    heading.tabIndex = -1;
    heading.style.outline = 'none';
    heading.focus({ preventScroll: true });
  }, [pathname]);
}
