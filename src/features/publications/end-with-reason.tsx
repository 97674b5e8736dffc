import type { UseMutationResult } from '@tanstack/react-query';
import { type ReactNode, useState } from 'react';
import { problemText } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { ConfirmDialog } from '../../ui/confirm-dialog.tsx';
import { useShelve, useWithdraw } from './publications.queries.ts';

type OfStudy = { organisationId: string; studyId: string };

type EndWithReasonProps = {
  act: UseMutationResult<unknown, Error, string>;
  word: string;
  title: string;
  consequence: ReactNode;
  keepWord: string;
  reason: { label: string; hint: string };
};

function EndWithReason({ act, word, ...asked }: EndWithReasonProps) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button variant="stop" onClick={() => setOpen(true)}>
        {word}
      </Button>
      <ConfirmDialog
        {...asked}
        isOpen={isOpen}
        onOpenChange={(next) => {
          act.reset();
          setOpen(next);
        }}
        confirmWord={word}
        busy={act.isPending}
        problem={act.error ? problemText(act.error) : undefined}
        onConfirm={(reason) => act.mutate(reason, { onSuccess: () => setOpen(false) })}
      />
    </>
  );
}

/** The other end of a closed study: no result is published. */
export function ShelveStudy({ organisationId, studyId }: OfStudy) {
  return (
    <EndWithReason
      act={useShelve(organisationId, studyId)}
      word="Shelve the study"
      title="Shelve this study?"
      consequence="No result is published; the record keeps the reason. The study and its report stay here, and it can still be published later."
      keepWord="Leave it closed"
      reason={{ label: 'Why no result is published', hint: 'Goes on the record.' }}
    />
  );
}

export function WithdrawPublication({ organisationId, studyId }: OfStudy) {
  return (
    <EndWithReason
      act={useWithdraw(organisationId, studyId)}
      word="Withdraw the publication"
      title="Withdraw this publication?"
      consequence="The public page says at its head that it is withdrawn, and why. It stays, with its record, and nothing may be claimed on it any more. This cannot be undone."
      keepWord="Keep it published"
      reason={{ label: 'Why it is withdrawn', hint: 'Stands on the public page and on the record.' }}
    />
  );
}
