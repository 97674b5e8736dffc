import type { ReactNode } from 'react';
import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { Button } from '../../ui/button.tsx';
import { CopyButton } from '../../ui/copy-button.tsx';
import { Notice } from '../../ui/notice.tsx';

type Join = NonNullable<ProctorView['join']>;
type SeatingProps = { join: Join; seats: ProctorView['seats']; canListenHere: boolean };

/** How phones come in: the code, the link, and a QR code where the address can be reached by a phone. */
export function Seating({ join, seats, canListenHere }: SeatingProps) {
  const seated = seats.filter(({ state }) => state !== 'left').length;
  return (
    <section className="flex flex-1 flex-wrap items-start justify-between gap-x-10 gap-y-6">
      <div className="@container flex min-w-0 flex-1 basis-96 flex-col gap-4">
        <h2 className="text-xl">Listeners take a seat with this code</h2>
        <p
          className="font-mono text-[clamp(2.5rem,min(24cqi,22svh),9rem)] leading-none font-bold tracking-[0.06em] whitespace-nowrap"
          data-session-code={join.code}
        >
          {join.code}
        </p>
        <p className="text-xl [overflow-wrap:anywhere] text-soft">{join.address}</p>
        <div className="flex flex-wrap gap-3">
          <CopyButton text={join.address} label="Copy the link" />
          {canListenHere && join.qrSvg !== null ? <OpenListener code={join.code} /> : null}
        </div>
        <p role="status" className="text-step font-bold">
          {seated === 0 ? 'Nobody is seated yet' : `${seated} seated`}
        </p>
        <p className="max-w-[38rem] text-soft">
          Close seating when everybody has a seat. The phones then give their random numbers, and from that moment
          nobody can change the draw. Whoever comes later takes part from the next trial on.
        </p>
      </div>
      {join.qrSvg === null ? (
        <Unreachable>{canListenHere ? <OpenListener code={join.code} /> : null}</Unreachable>
      ) : (
        <QrCode svg={join.qrSvg} />
      )}
    </section>
  );
}

function Unreachable({ children }: { children: ReactNode }) {
  return (
    <Notice tone="amber" title="Phones cannot reach this address." className="max-w-[26rem]">
      <span className="mt-1 mb-3 block">
        It leads to this machine only. Stop Fairlead and start it with <code>npm start -- --lan</code>; or open the
        listeners on this machine, one window per seat.
      </span>
      {children}
    </Notice>
  );
}

/** One window per seat: a seat is kept per window, so that one machine can stand for a whole room. */
function OpenListener({ code }: { code: string }) {
  return (
    <Button onClick={() => window.open(`/listen/${code}`, '_blank', 'popup,width=400,height=860')}>
      Open a listener here
    </Button>
  );
}

function QrCode({ svg }: { svg: string }) {
  const source = `data:image/svg+xml;charset=utf-8,${encodeURIComponent(svg)}`;
  return (
    <img
      src={source}
      alt="QR code that leads to a seat in this session"
      className="aspect-square w-full max-w-80 rounded bg-plate"
    />
  );
}
