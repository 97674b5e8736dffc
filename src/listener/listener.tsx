import { useEffect, useState } from 'react';
import { usePageTheme } from '../app/layouts/page-theme.ts';
import { useDocumentTitle } from '../ui/document-title.ts';
import { InvitedPage } from './invited-page.tsx';
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

/** The token of a personal link, which leads to its own seat and to no other. */
function linkInAddress(): string | null {
  return window.location.pathname === '/listen/invitation' ? window.location.hash.slice(1) : null;
}

/** Before a seat: the way to one. With a seat: the session, at the address that is the seat. */
export function Listener() {
  usePageTheme('dim');
  const [seat, setSeat] = useState<Seat | null>(() => {
    const token = tokenInAddress();
    return token === null ? null : sitDown(token);
  });
  const [link] = useState(linkInAddress);
  useDocumentTitle(titleOf(seat, link));
  useEffect(() => {
    // Another seat's link, opened in this tab, changes nothing but the part after the #.
    const reload = () => window.location.reload();
    window.addEventListener('hashchange', reload);
    return () => window.removeEventListener('hashchange', reload);
  }, []);
  if (seat !== null) return <SeatPage seat={seat} />;
  const takeSeat = (token: string) => setSeat(sitDown(token));
  return link === null ? <JoinPage onSeated={takeSeat} /> : <InvitedPage token={link} onSeated={takeSeat} />;
}

function titleOf(seat: Seat | null, link: string | null): string {
  if (seat !== null) return 'Your seat';
  return link === null ? 'Take a seat' : 'Your invitation';
}

function sitDown(token: string): Seat {
  window.history.replaceState(null, '', `/seat#${token}`);
  rememberSeat(token);
  return new Seat(token);
}
