import { useEffect, useRef } from 'react';
import { useLocation } from 'react-router-dom';

/** Moves the focus to the main heading (or the content) when another page has opened, so that keys and readers begin there. */
export function useArrival() {
  const { pathname } = useLocation();
  const shownPath = useRef(pathname);
  useEffect(() => {
    if (shownPath.current === pathname) return;
    shownPath.current = pathname;
    const place = document.querySelector<HTMLElement>('main h1') ?? document.querySelector<HTMLElement>('main');
    if (place === null) return;
    place.tabIndex = -1;
    place.style.outline = 'none';
    place.focus({ preventScroll: true });
  }, [pathname]);
}
