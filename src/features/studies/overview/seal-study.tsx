import { useState } from 'react';
import type { Study } from '#shared/contracts/studies.ts';
import { problemText } from '../../../lib/show-problem.ts';
import { Button } from '../../../ui/button.tsx';
import { ConfirmDialog } from '../../../ui/confirm-dialog.tsx';
import { useToast } from '../../../ui/toast.tsx';
import { useSealStudy } from '../studies.queries.ts';
import { ProtocolList } from './protocol.tsx';

type SealStudyProps = { organisationId: string; study: Study };

export function SealStudy({ organisationId, study }: SealStudyProps) {
  const [isOpen, setOpen] = useState(false);
  const toast = useToast();
  const seal = useSealStudy(organisationId, study.id, () => {
    setOpen(false);
    toast('The protocol is sealed.', 'held');
  });

  return (
    <>
      <Button variant="primary" onClick={() => setOpen(true)}>
        Seal the protocol
      </Button>
      <ConfirmDialog
        isOpen={isOpen}
        onOpenChange={(next) => {
          seal.reset();
          setOpen(next);
        }}
        title="Seal this protocol?"
        consequence={<WhatIsFixed study={study} />}
        confirmWord="Seal it for good"
        keepWord="Keep the draft"
        busy={seal.isPending}
        problem={seal.error ? problemText(seal.error) : undefined}
        onConfirm={() => seal.mutate()}
      />
    </>
  );
}

function WhatIsFixed({ study }: { study: Study }) {
  return (
    <div className="flex flex-col gap-4">
      <p>
        A sealed protocol is never edited. Its digest becomes the first entry of the record, with your name and the
        time. This is what will be fixed:
      </p>
      <p className="font-semibold">{study.title}</p>
      <ProtocolList study={study} />
    </div>
  );
}
