import { ConfirmDialog } from '../../ui/confirm-dialog.tsx';
import type { ConsoleDialogProps } from './console-dialog.ts';

/** Asked only while they listen: it stops what they hear. */
export function TakeBackDialog({ isOpen, onOpenChange, actions }: ConsoleDialogProps) {
  return (
    <ConfirmDialog
      isOpen={isOpen}
      onOpenChange={onOpenChange}
      title="Take back the start?"
      consequence="Stop the music. The presentation begins again with its whole change, and the record keeps both."
      confirmWord="Take back the start"
      keepWord="Let them listen"
      busy={actions.isBusy}
      {...(actions.problem === null ? {} : { problem: actions.problem })}
      onConfirm={() => void actions.act({ kind: 'undo-step' }).then((isDone) => isDone && onOpenChange(false))}
    />
  );
}
