import { useEffect, useState } from 'react';
import { JoinPage } from './join-page.tsx';
import { Seat } from './seat.ts';
import { SeatPage } from './seat-page.tsx';

const tokenInAddress = () => {
  const token = window.location.hash.slice(1);
  return window.location.pathname.startsWith('/seat') && token !== '' ? token : null;
};

/** Before a seat: the way to one. With a seat: the session, at the address that is the seat. */
export function Listener() {
  const [seat, setSeat] = useState<Seat | null>(() => {
    const token = tokenInAddress();
    return token === null ? null : new Seat(token);
  });
  useEffect(() => {
    document.title = seat === null ? 'Take a seat · Fairlead' : 'Your seat · Fairlead';
  }, [seat]);

  const sit = (token: string) => {
    window.history.replaceState(null, '', `/seat#${token}`);
    setSeat(new Seat(token));
  };
  return seat === null ? <JoinPage onSeated={sit} /> : <SeatPage seat={seat} />;
}
