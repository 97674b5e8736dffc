import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { Button } from '../../ui/button.tsx';
import { CopyButton } from '../../ui/copy-button.tsx';
import { Notice } from '../../ui/notice.tsx';

type Join = NonNullable<ProctorView['join']>;

/** How phones come in: the code, the link, and a QR code where the address can be reached by a phone. */
export function Seating({ join, isDemo }: { join: Join; isDemo: boolean }) {
  const path = `/listen/${join.code}`;
  return (
    <section className="flex flex-wrap items-start gap-10">
      <div className="flex min-w-0 flex-col gap-4">
        <h2 className="text-xl">Listeners take a seat with this code</h2>
        <p
          className="font-mono text-[clamp(3rem,12vw,6.5rem)] leading-none font-bold tracking-[0.08em]"
          data-session-code={join.code}
        >
          {join.code}
        </p>
        <p className="break-all text-soft">{join.address}</p>
        <div className="flex flex-wrap gap-3">
          <CopyButton text={join.address} label="Copy the link" />
          {isDemo ? (
            <Button onClick={() => window.open(path, '_blank', 'popup,width=400,height=860')}>
              Open a listener here
            </Button>
          ) : null}
        </div>
        <p className="max-w-[34rem] text-soft">
          When everybody is seated, close seating. The phones then give their random numbers, and from that moment
          nobody can change the draw. Whoever comes later takes part from the next trial on.
        </p>
      </div>
      {join.qrSvg === null ? (
        <Notice tone="amber" title="Phones cannot reach this address." className="max-w-[26rem]">
          It leads to this machine only. Start Fairlead with HOST=0.0.0.0 and PUBLIC_URL set to this machine’s address
          on the network, or open listeners here, one window per seat.
        </Notice>
      ) : (
        <QrCode svg={join.qrSvg} />
      )}
    </section>
  );
}

function QrCode({ svg }: { svg: string }) {
  const source = `data:image/svg+xml;charset=utf-8,${encodeURIComponent(svg)}`;
  return (
    <img src={source} alt="QR code that leads to a seat in this session" className="size-64 rounded bg-plate p-2" />
  );
}
