import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { ConfirmDialog } from '../../ui/confirm-dialog.tsx';
import type { ConsoleDialogProps } from './console-dialog.ts';

function consequenceOf(view: ProctorView): string {
  const open = view.trial === null ? '' : ' The open trial is not counted.';
  return `It cannot be taken up again, keeps its number for good, and every locked trial counts.${open}`;
}

/** Ends a session whose trials are not all held, with a reason. */
export function EndDialog({ view, isOpen, onOpenChange, actions }: ConsoleDialogProps & { view: ProctorView }) {
  return (
    <ConfirmDialog
      isOpen={isOpen}
      onOpenChange={onOpenChange}
      title="End this session before its last trial?"
      consequence={consequenceOf(view)}
      confirmWord="End the session"
      keepWord="Go on"
      reason={{ label: 'Why does it end here?', hint: 'This goes on the record. No names.' }}
      busy={actions.isBusy}
      {...(actions.problem === null ? {} : { problem: actions.problem })}
      onConfirm={(reason) =>
        void actions.act({ kind: 'abandon', reason }).then((isDone) => isDone && onOpenChange(false))
      }
    />
  );
}
