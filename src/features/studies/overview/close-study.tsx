import { useState } from 'react';
import type { Study } from '#shared/contracts/studies.ts';
import { problemText } from '../../../lib/show-problem.ts';
import { Button } from '../../../ui/button.tsx';
import { ConfirmDialog } from '../../../ui/confirm-dialog.tsx';
import { useCloseStudy } from '../studies.queries.ts';

type CloseStudyProps = { organisationId: string; study: Study; onClosed: () => void };

/** Complete: one question. Not complete: a reason as well. */
export function CloseStudy({ organisationId, study, onClosed }: CloseStudyProps) {
  const [isOpen, setOpen] = useState(false);
  const close = useCloseStudy(organisationId, study.id, onClosed);
  const { complete } = study.closing;

  return (
    <>
      <Button variant={complete ? 'primary' : 'stop'} onClick={() => setOpen(true)}>
        {complete ? 'Close the study' : 'End the study early'}
      </Button>
      <ConfirmDialog
        isOpen={isOpen}
        onOpenChange={(next) => {
          close.reset();
          setOpen(next);
        }}
        title={complete ? 'Close this study?' : 'End this study early?'}
        consequence={<WhatClosingDoes study={study} />}
        confirmWord={complete ? 'Close and run the analysis' : 'End early and run the analysis'}
        keepWord="Keep it open"
        {...(complete
          ? {}
          : { reason: { label: 'Why it ends early', hint: 'Goes on the record and stands in the report.' } })}
        busy={close.isPending}
        problem={close.error ? problemText(close.error) : undefined}
        onConfirm={(reason) => close.mutate(reason)}
      />
    </>
  );
}

function WhatClosingDoes({ study }: { study: Study }) {
  const { complete } = study.closing;
  const { trialsLocked, trialsRegistered } = study.progress;
  return (
    <div className="flex flex-col gap-3">
      <p>Closing does three things, at once and for good:</p>
      <ul className="flex list-disc flex-col gap-1.5 pl-6">
        <li>It opens both secrets: which code was which cable, and what was drawn for every trial.</li>
        <li>It runs the registered analysis, once, and puts its result on the record, whatever it is.</li>
        <li>No further session can be held in this study.</li>
      </ul>
      <p>
        {complete
          ? `All ${trialsRegistered} registered trials are locked. `
          : `${trialsLocked} of ${trialsRegistered} registered trials are locked. Ended early while blind, the study stays a registered result, at the ${trialsLocked} reached. `}
        <strong>It cannot be undone.</strong>
      </p>
    </div>
  );
}
