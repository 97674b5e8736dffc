import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { ConfirmDialog } from '../../ui/confirm-dialog.tsx';
import type { ConsoleDialogProps } from './console-dialog.ts';

type InventoryDialogProps = ConsoleDialogProps & { inventory: NonNullable<ProctorView['inventory']> };

/** Ends the inventory although sleeves are missing. */
export function InventoryDialog({ inventory, isOpen, onOpenChange, actions }: InventoryDialogProps) {
  const { of, found } = inventory;
  return (
    <ConfirmDialog
      isOpen={isOpen}
      onOpenChange={onOpenChange}
      title={`End the inventory with ${found.length} of ${of}?`}
      consequence="It is a deviation: the report names the missing sleeves and your reason."
      confirmWord="End the inventory"
      keepWord="Go on looking"
      reason={{ label: 'Why are they not all there?', hint: 'This goes on the record. No names.' }}
      busy={actions.isBusy}
      {...(actions.problem === null ? {} : { problem: actions.problem })}
      onConfirm={(reason) =>
        void actions.act({ kind: 'end-inventory', reason }).then((isDone) => isDone && onOpenChange(false))
      }
    />
  );
}
