import { AlertDialog as Radix } from 'radix-ui';
import { type ReactNode, useRef, useState } from 'react';
import { Actions } from './actions.tsx';
import { Button } from './button.tsx';
import { dialogLook, dialogTitleLook, veilLook } from './dialog-look.ts';
import { useReturnFocus } from './return-focus.ts';
import { TextAreaField } from './text-area-field.tsx';

type ConfirmDialogProps = {
  isOpen: boolean;
  onOpenChange: (isOpen: boolean) => void;
  /** A question: "End this session?" */
  title: string;
  /** What will happen, what is kept, and whether it can be undone. */
  consequence: ReactNode;
  /** The word on the button that does it: "End session". */
  confirmWord: string;
  /** The word on the button that does not: "Keep listening". */
  keepWord: string;
  /** Asks why; the answer is required and handed to onConfirm, trimmed. */
  reason?: { label: string; hint?: string };
  busy?: boolean;
  /** Why it could not be done; the dialog stays open. */
  problem?: string;
  onConfirm: (reason: string) => void;
};

/** Asks once before something ends. */
export function ConfirmDialog({ isOpen, onOpenChange, busy = false, ...asked }: ConfirmDialogProps) {
  const focus = useReturnFocus();
  const content = useRef<HTMLDivElement>(null);
  return (
    <Radix.Root open={isOpen} onOpenChange={(next) => (busy ? undefined : onOpenChange(next))}>
      <Radix.Portal>
        <Radix.Overlay className={veilLook} />
        <Radix.Content
          ref={content}
          className={dialogLook}
          onCloseAutoFocus={focus.giveBack}
          onOpenAutoFocus={(event) => {
            focus.remember();
            const area = content.current?.querySelector('textarea');
            if (!area) return;
            event.preventDefault();
            area.focus();
          }}
        >
          <Question {...asked} busy={busy} />
        </Radix.Content>
      </Radix.Portal>
    </Radix.Root>
  );
}

type QuestionProps = Omit<ConfirmDialogProps, 'isOpen' | 'onOpenChange'>;

/** Lives only while the dialog is open, so that a reason written for one thing never greets the next. */
function Question({ title, consequence, confirmWord, keepWord, reason, busy, problem, onConfirm }: QuestionProps) {
  const [text, setText] = useState('');
  const [isRefused, setRefused] = useState(false);
  const area = useRef<HTMLTextAreaElement>(null);

  function confirm() {
    const written = text.trim();
    if (!reason || written !== '') return onConfirm(written);
    setRefused(true);
    area.current?.focus();
  }

  return (
    <>
      <Radix.Title className={dialogTitleLook}>{title}</Radix.Title>
      <Radix.Description asChild>
        <div>{consequence}</div>
      </Radix.Description>
      {reason ? (
        <TextAreaField
          {...reason}
          ref={area}
          required
          value={text}
          onChange={(event) => setText(event.target.value)}
          error={isRefused && text.trim() === '' ? 'Write a reason; it is kept.' : undefined}
        />
      ) : null}
      <p role="alert" className="border-l-4 border-amber pl-2.5 font-semibold text-amber empty:hidden">
        {problem}
      </p>
      <Actions
        stop={
          <Button variant="stop" busy={busy} onClick={confirm}>
            {confirmWord}
          </Button>
        }
      >
        <Radix.Cancel asChild>
          <Button disabled={busy}>{keepWord}</Button>
        </Radix.Cancel>
      </Actions>
    </>
  );
}
