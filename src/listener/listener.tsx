import { useEffect, useState } from 'react';
import { usePageTheme } from '../app/layouts/page-theme.ts';
import { useDocumentTitle } from '../ui/document-title.ts';
import { JoinPage } from './join-page.tsx';
import { Seat } from './seat.ts';
import { lastSeat, rememberSeat } from './seat-memory.ts';
import { SeatPage } from './seat-page.tsx';

/** The token after the # is the seat; without one, the seat that this tab took last. */
function tokenInAddress(): string | null {
  if (!window.location.pathname.startsWith('/seat')) return null;
  const token = window.location.hash.slice(1);
  return token === '' ? lastSeat() : token;
}

/** Before a seat: the way to one. With a seat: the session, at the address that is the seat. */
export function Listener() {
  usePageTheme('dim');
  const [seat, setSeat] = useState<Seat | null>(() => {
    const token = tokenInAddress();
    return token === null ? null : sitDown(token);
  });
  useDocumentTitle(seat === null ? 'Take a seat' : 'Your seat');
  useEffect(() => {
    // Another seat's link, opened in this tab, changes nothing but the part after the #.
    const reload = () => window.location.reload();
    window.addEventListener('hashchange', reload);
    return () => window.removeEventListener('hashchange', reload);
  }, []);
  return seat === null ? <JoinPage onSeated={(token) => setSeat(sitDown(token))} /> : <SeatPage seat={seat} />;
}

function sitDown(token: string): Seat {
  window.history.replaceState(null, '', `/seat#${token}`);
  rememberSeat(token);
  return new Seat(token);
}
