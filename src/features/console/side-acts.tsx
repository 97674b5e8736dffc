import { useState } from 'react';
import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { Actions } from '../../ui/actions.tsx';
import { Button } from '../../ui/button.tsx';
import { ByHandDialog } from './by-hand-dialog.tsx';
import { startsListening } from './console-words.ts';
import { DeviationDialog } from './deviation-dialog.tsx';
import { EarlyDialog } from './early-dialog.tsx';
import { EndDialog } from './end-dialog.tsx';
import { InventoryDialog } from './inventory-dialog.tsx';
import { isComplete } from './next-act.ts';
import { TakeBackDialog } from './take-back-dialog.tsx';
import type { ConsoleActions } from './use-console.ts';
import { useKeys } from './use-keys.ts';
import { isCounting, isScanning, type Labels } from './use-labels.ts';
import { VoidDialog } from './void-dialog.tsx';

type SideActsProps = {
  view: ProctorView;
  actions: Pick<ConsoleActions, 'act' | 'isBusy' | 'problem' | 'forgetProblem'>;
  /** The next act, for the space bar; null while there is none. */
  onNext: (() => void) | null;
  keys: readonly [boolean, (isOn: boolean) => void];
  labels: Labels;
};

type Asked = 'early' | 'void' | 'deviation' | 'end' | 'by-hand' | 'take-back' | 'inventory';
type SideAct = { label: string; letter: string; run: () => void };

// A phone has no Alt key to speak of.
const noHintOnPhone = 'max-sm:[&_kbd]:hidden';

const takeBackWords = (view: ProctorView) =>
  startsListening(view, view.trial?.undo ?? null) ? 'Take back the start' : `Undo ${view.trial?.undo ?? ''}`;

/** Whatever may become necessary beside the next act; each on Alt and a letter. */
export function SideActs({ view, actions, onNext, keys: [areKeysOn, setKeysOn], labels }: SideActsProps) {
  const [asked, setAsked] = useState<Asked | null>(null);
  const ask = (what: Asked) => () => {
    actions.forgetProblem();
    setAsked(what);
  };
  const pause = (reason: 'break' | 'trouble') => () => {
    if (!actions.isBusy) void actions.act({ kind: 'pause', reason });
  };
  const takeBack = () => {
    if (view.trial?.stage === 'listening') ask('take-back')();
    else if (!actions.isBusy) void actions.act({ kind: 'undo-step' });
  };
  const isRunning = view.phase === 'running';
  const acts: SideAct[] = [
    ...(isScanning(view) ? [{ label: 'Confirm by hand', letter: 'h', run: ask('by-hand') }] : []),
    ...(isCounting(view) ? [{ label: 'End the inventory', letter: 'i', run: ask('inventory') }] : []),
    ...(view.trial === null || view.trial.undo === null
      ? []
      : [{ label: takeBackWords(view), letter: 'u', run: takeBack }]),
    ...(isRunning && view.paused === null
      ? [
          { label: 'Break', letter: 'b', run: pause('break') },
          { label: 'Pause', letter: 'p', run: pause('trouble') },
        ]
      : []),
    ...(isRunning && view.trial !== null ? [{ label: 'Void this trial', letter: 'v', run: ask('void') }] : []),
    ...(view.block?.break ? [{ label: 'Go on early', letter: 'g', run: ask('early') }] : []),
    { label: 'Record a deviation', letter: 'd', run: ask('deviation') },
  ];
  // A complete session is finished by its next act; there is nothing left to abandon.
  const end = isComplete(view) ? null : { label: 'End session', letter: 'e', run: ask('end') };
  const lettered = end === null ? acts : [...acts, end];
  // The camera's own button stands beside the field for labels.
  const letters = Object.fromEntries(lettered.map(({ letter, run }) => [letter, run]));
  const camera = { c: () => labels.setCameraOn(!labels.isCameraOn) };
  useKeys(onNext, labels.isWanted ? { ...letters, ...camera } : letters, areKeysOn);

  const hint = (letter: string) => (areKeysOn ? { keyHint: `Alt+${letter.toUpperCase()}` } : {});
  const dialog = (what: Asked) => ({
    isOpen: asked === what,
    onOpenChange: (isOpen: boolean) => setAsked(isOpen ? what : null),
    actions,
  });
  return (
    <>
      <Actions
        stop={
          end === null ? null : (
            <Button variant="stop" {...hint(end.letter)} onClick={end.run} className={noHintOnPhone}>
              {end.label}
            </Button>
          )
        }
      >
        {acts.map(({ label, letter, run }) => (
          <Button key={label} {...hint(letter)} onClick={run} className={noHintOnPhone}>
            {label}
          </Button>
        ))}
        <label className="flex min-h-12 cursor-pointer items-center gap-2 text-soft max-sm:hidden">
          <input
            type="checkbox"
            checked={areKeysOn}
            onChange={(event) => setKeysOn(event.target.checked)}
            className="size-6 cursor-pointer accent-jacket"
          />
          Alt keys
        </label>
      </Actions>
      <VoidDialog {...dialog('void')} neverCounts={(view.trial?.number ?? 1) <= 0} />
      <EarlyDialog {...dialog('early')} why={view.block?.break?.why ?? ''} />
      <DeviationDialog {...dialog('deviation')} />
      <EndDialog {...dialog('end')} view={view} />
      <ByHandDialog {...dialog('by-hand')} code={view.trial?.code ?? ''} />
      <TakeBackDialog {...dialog('take-back')} />
      {view.inventory === null ? null : <InventoryDialog {...dialog('inventory')} inventory={view.inventory} />}
    </>
  );
}
