import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { clockFace } from '../../ui/clock-face.ts';
import { useSecondsSince } from './use-seconds-since.ts';

type Pause = NonNullable<ProctorView['paused']>;

function pauseWords(
  { reason, seat }: Pause,
  { block, levels }: Pick<ProctorView, 'block' | 'levels'>,
): { title: string; detail: string } {
  if (reason === 'too-loud')
    return {
      title: `Too loud${seat === null ? '' : ` from ${seat}`}`,
      detail: 'Mute, turn the level down, and ask how they are. A changed level is a deviation to record.',
    };
  if (block?.break) {
    const { number, said, of } = block.break;
    const due = levels?.due === 'half-time' ? ' The levels are due: have them measured now.' : '';
    return {
      title: `Break ${number}`,
      detail: `A block of ${block.trials} is over. ${said} of ${of} said how they feel.${due}`,
    };
  }
  if (reason === 'break')
    return { title: 'Break', detail: 'Ears need ten minutes at least. Ask who is tired before you resume.' };
  return { title: 'Paused', detail: 'Nothing goes on until you resume.' };
}

type PauseBannerProps = { pause: Pause; view: Pick<ProctorView, 'block' | 'levels'>; clockOffsetMs: number };

/** Why nothing goes on, and for how long by now. */
export function PauseBanner({ pause, view, clockOffsetMs }: PauseBannerProps) {
  const seconds = useSecondsSince(pause.since, clockOffsetMs);
  const { title, detail } = pauseWords(pause, view);
  return (
    <div className="flex flex-wrap items-start justify-between gap-x-8 gap-y-1 rounded border-2 border-amber px-5 py-4">
      <div role="alert" className="min-w-0 flex-1">
        <strong className="block text-2xl text-amber">{title}</strong>
        <span>{detail}</span>
      </div>
      <span role="timer" aria-live="off" className="font-mono text-2xl font-bold tabular-nums">
        {clockFace(seconds)}
      </span>
    </div>
  );
}
