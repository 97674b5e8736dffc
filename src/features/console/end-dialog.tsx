import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { ConfirmDialog } from '../../ui/confirm-dialog.tsx';
import type { ConsoleDialogProps } from './console-dialog.ts';

function consequenceOf(view: ProctorView): string {
  if (view.rehearsal) return 'Nothing of it is kept. The session itself stays as it is.';
  const open = view.trial === null ? '' : ' The open trial is not counted.';
  return `It cannot be taken up again, keeps its number for good, and every locked trial counts.${open}`;
}

/** Ends a session whose trials are not all held, with a reason. */
export function EndDialog({ view, isOpen, onOpenChange, actions }: ConsoleDialogProps & { view: ProctorView }) {
  return (
    <ConfirmDialog
      isOpen={isOpen}
      onOpenChange={onOpenChange}
      title={view.rehearsal ? 'End this rehearsal?' : 'End this session before its last trial?'}
      consequence={consequenceOf(view)}
      confirmWord={view.rehearsal ? 'End the rehearsal' : 'End the session'}
      keepWord="Go on"
      {...(view.rehearsal
        ? {}
        : { reason: { label: 'Why does it end here?', hint: 'This goes on the record. No names.' } })}
      busy={actions.isBusy}
      {...(actions.problem === null ? {} : { problem: actions.problem })}
      onConfirm={(reason) =>
        void actions
          .act({ kind: 'abandon', reason: view.rehearsal ? 'rehearsed' : reason })
          .then((isDone) => isDone && onOpenChange(false))
      }
    />
  );
}
