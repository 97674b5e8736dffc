import { useState } from 'react';
import { type ProctorView, type VoidReason, voidReasons } from '#shared/contracts/proctor-live.ts';
import { Actions } from '../../ui/actions.tsx';
import { Button } from '../../ui/button.tsx';
import { ConfirmDialog } from '../../ui/confirm-dialog.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import { TextAreaField } from '../../ui/text-area-field.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { voidWords } from './console-words.ts';
import type { ConsoleActions } from './use-console.ts';
import { useKeys } from './use-keys.ts';

type SideActsProps = {
  view: ProctorView;
  actions: Pick<ConsoleActions, 'act' | 'isBusy' | 'problem'>;
  /** The next act, for the space bar; null while there is none. */
  onNext: (() => void) | null;
  keys: readonly [boolean, (isOn: boolean) => void];
};

type Shown = 'void' | 'end' | 'deviation' | null;

/** Whatever may become necessary beside the next act; each on Alt and a letter. */
export function SideActs({ view, actions, onNext, keys: [areKeysOn, setKeysOn] }: SideActsProps) {
  const { act, isBusy } = actions;
  const [shown, setShown] = useState<Shown>(null);
  const isRunning = view.phase === 'running';
  const pause = () => void act({ kind: 'pause', reason: view.trial === null ? 'break' : 'trouble' });
  const canVoid = isRunning && view.trial !== null;
  const canPause = isRunning && view.paused === null;
  useKeys(
    onNext,
    {
      ...(canPause ? { b: pause } : {}),
      ...(canVoid ? { v: () => setShown('void') } : {}),
      d: () => setShown('deviation'),
      e: () => setShown('end'),
    },
    areKeysOn,
  );
  const hint = (key: string) => (areKeysOn ? { keyHint: key } : {});
  const close = (isOpen: boolean) => (isOpen ? undefined : setShown(null));
  return (
    <>
      <Actions
        stop={
          <Button variant="stop" {...hint('Alt+E')} onClick={() => setShown('end')}>
            End session
          </Button>
        }
      >
        {canPause ? (
          <Button {...hint('Alt+B')} onClick={pause}>
            Break
          </Button>
        ) : null}
        {canVoid ? (
          <Button {...hint('Alt+V')} onClick={() => setShown('void')}>
            Void this trial
          </Button>
        ) : null}
        <Button {...hint('Alt+D')} onClick={() => setShown('deviation')}>
          Deviation
        </Button>
        <label className="flex min-h-11 items-center gap-2 text-soft">
          <input
            type="checkbox"
            checked={areKeysOn}
            onChange={(event) => setKeysOn(event.target.checked)}
            className="size-5 accent-copper"
          />
          Alt keys
        </label>
      </Actions>
      <VoidDialog isOpen={shown === 'void'} onOpenChange={close} actions={actions} />
      <DeviationDialog isOpen={shown === 'deviation'} onOpenChange={close} actions={actions} />
      <ConfirmDialog
        isOpen={shown === 'end'}
        onOpenChange={close}
        title="End this session before its last trial?"
        consequence="It cannot be resumed. It keeps its number, and every locked trial counts. An open trial is not counted."
        confirmWord="End the session"
        keepWord="Go on"
        reason={{ label: 'Why does it end here?', hint: 'This goes on the record.' }}
        busy={isBusy}
        {...(actions.problem === null ? {} : { problem: actions.problem })}
        onConfirm={(reason) => void act({ kind: 'abandon', reason }).then((isDone) => isDone && setShown(null))}
      />
    </>
  );
}

type DialogProps = {
  isOpen: boolean;
  onOpenChange: (isOpen: boolean) => void;
  actions: Pick<ConsoleActions, 'act' | 'isBusy' | 'problem'>;
};

function VoidDialog({ isOpen, onOpenChange, actions }: DialogProps) {
  const [reason, setReason] = useState<VoidReason | ''>('');
  const [note, setNote] = useState('');
  const send = async () => {
    if (reason === '') return;
    const isDone = await actions.act({ kind: 'void-trial', reason, note });
    if (!isDone) return;
    setReason('');
    setNote('');
    onOpenChange(false);
  };
  return (
    <Dialog
      isOpen={isOpen}
      onOpenChange={onOpenChange}
      title="Void this trial?"
      description="It stays in the record with its reason and does not count. A spare of the same draw takes its place at the end."
      actions={
        <Button variant="stop" disabled={reason === ''} busy={actions.isBusy} onClick={send}>
          Set the trial aside
        </Button>
      }
    >
      <SelectField
        label="Reason"
        placeholder="Choose a reason"
        value={reason}
        onChange={(event) => setReason(voidReasons.find((known) => known === event.target.value) ?? '')}
        options={voidReasons.map((value) => ({ value, label: voidWords[value] }))}
      />
      <TextField
        label="Note"
        optional
        hint="No names."
        maxLength={300}
        value={note}
        onChange={(event) => setNote(event.target.value)}
      />
    </Dialog>
  );
}

function DeviationDialog({ isOpen, onOpenChange, actions }: DialogProps) {
  const [text, setText] = useState('');
  const send = async () => {
    const isDone = await actions.act({ kind: 'record-deviation', text });
    if (!isDone) return;
    setText('');
    onOpenChange(false);
  };
  return (
    <Dialog
      isOpen={isOpen}
      onOpenChange={onOpenChange}
      title="Record a deviation"
      description="What differed from the sealed protocol, and why. It goes on the record with its time and into the report."
      actions={
        <Button variant="primary" disabled={text.trim().length < 3} busy={actions.isBusy} onClick={send}>
          Record it
        </Button>
      }
    >
      <TextAreaField
        label="What differed, and why"
        maxLength={1000}
        value={text}
        onChange={(event) => setText(event.target.value)}
      />
    </Dialog>
  );
}
