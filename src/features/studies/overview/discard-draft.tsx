import { useState } from 'react';
import { problemText } from '../../../lib/show-problem.ts';
import { Button } from '../../../ui/button.tsx';
import { ConfirmDialog } from '../../../ui/confirm-dialog.tsx';
import { useDiscardStudy } from '../studies.queries.ts';

type DiscardDraftProps = { organisationId: string; studyId: string; title: string; onDiscarded: () => void };

export function DiscardDraft({ organisationId, studyId, title, onDiscarded }: DiscardDraftProps) {
  const [isOpen, setOpen] = useState(false);
  const discard = useDiscardStudy(organisationId, studyId);
  return (
    <>
      <Button variant="stop" onClick={() => setOpen(true)}>
        Discard the draft
      </Button>
      <ConfirmDialog
        isOpen={isOpen}
        onOpenChange={(next) => {
          discard.reset();
          setOpen(next);
        }}
        title={`Discard “${title}”?`}
        consequence="The draft is deleted and cannot be brought back. Nothing of it is on any record yet."
        confirmWord="Discard it"
        keepWord="Keep the draft"
        busy={discard.isPending}
        problem={discard.error ? problemText(discard.error) : undefined}
        onConfirm={() => discard.mutate(undefined, { onSuccess: onDiscarded })}
      />
    </>
  );
}
