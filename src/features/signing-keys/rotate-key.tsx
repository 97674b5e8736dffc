import { useState } from 'react';
import type { SigningKey } from '#shared/contracts/signing-keys.ts';
import { problemText } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { ConfirmDialog } from '../../ui/confirm-dialog.tsx';
import { useToast } from '../../ui/toast.tsx';
import { useRotateKey } from './signing-keys.queries.ts';

/** Ends the key in use and makes the next one; asked once, with the reason. */
export function RotateKey({ organisationId, current }: { organisationId: string; current: SigningKey }) {
  const [isOpen, setOpen] = useState(false);
  const rotation = useRotateKey(organisationId);
  const showToast = useToast();

  function confirm(reason: string) {
    rotation.mutate(
      { retire: current.fingerprint, reason },
      {
        onSuccess: () => {
          setOpen(false);
          showToast('A new key signs from now on. Hand out its fingerprint.', 'held');
        },
      },
    );
  }

  return (
    <>
      <Button variant="stop" onClick={() => setOpen(true)}>
        Replace the key …
      </Button>
      <ConfirmDialog
        isOpen={isOpen}
        onOpenChange={(next) => {
          rotation.reset();
          setOpen(next);
        }}
        title="Replace the signing key?"
        consequence="This key signs nothing more, and that cannot be undone. It stays listed with its dates, and what it signed still verifies. Whoever compared its fingerprint has to compare the new one."
        confirmWord="Replace the key"
        keepWord="Keep this key"
        reason={{ label: 'Why it is replaced', hint: 'Stays in the list of retired keys.' }}
        busy={rotation.isPending}
        problem={rotation.error ? problemText(rotation.error) : undefined}
        onConfirm={confirm}
      />
    </>
  );
}

/** Makes the first key, before anything is signed. */
export function MakeKey({ organisationId }: { organisationId: string }) {
  const making = useRotateKey(organisationId);
  const showToast = useToast();
  return (
    <Button
      variant="primary"
      busy={making.isPending}
      onClick={() =>
        making.mutate({ retire: null, reason: '' }, { onError: (error) => showToast(problemText(error), 'amber') })
      }
    >
      Make the key
    </Button>
  );
}
