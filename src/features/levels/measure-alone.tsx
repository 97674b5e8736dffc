import { useState } from 'react';
import { Button } from '../../ui/button.tsx';
import { ConfirmDialog } from '../../ui/confirm-dialog.tsx';

/** The proctor measures after all: asked once, for what is seen cannot be unseen. */
export function MeasureAlone({ onConfirm }: { onConfirm: () => void }) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button onClick={() => setOpen(true)}>Measure alone</Button>
      <ConfirmDialog
        isOpen={isOpen}
        onOpenChange={setOpen}
        title="Measure the levels yourself?"
        consequence="You then see how loud each code is, and may know a cable by it. The record says that the proctor measured, and the study counts as listener-blind for good."
        confirmWord="Measure alone"
        keepWord="Let somebody else measure"
        onConfirm={() => {
          setOpen(false);
          onConfirm();
        }}
      />
    </>
  );
}
