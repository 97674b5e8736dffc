import { type ReactNode, useState } from 'react';
import type { CodesStatus } from '#shared/contracts/codes.ts';
import { problemText } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { ConfirmDialog } from '../../ui/confirm-dialog.tsx';
import { LinkButton } from '../../ui/link-button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { useConfirmCodes, useDrawCodes } from './codes.queries.ts';

type HolderStepsProps = { organisationId: string; status: CodesStatus; labelsTo: string };

/** What the code holder does next: draw, sleeve and label, confirm. */
export function HolderSteps({ organisationId, status, labelsTo }: HolderStepsProps) {
  switch (status.state) {
    case 'none':
      return <DrawStep organisationId={organisationId} status={status} />;
    case 'drawn':
      return <SleeveStep organisationId={organisationId} status={status} labelsTo={labelsTo} />;
    case 'confirmed':
      return (
        <Step title="Done" actions={<LinkButton to={labelsTo}>Open the code sheet again</LinkButton>}>
          Sessions can open. Keep the key to yourself until the study is closed; to check a specimen the sheet can be
          opened again, and that opening is recorded too.
        </Step>
      );
  }
}

function DrawStep({ organisationId, status }: { organisationId: string; status: CodesStatus }) {
  const draw = useDrawCodes(organisationId, status.studyId);
  if (!status.isSealed)
    return (
      <Step title="The protocol is not sealed yet" actions={null}>
        Its specimens can still change, so there is nothing to code. Once a manager has sealed the study, the codes are
        drawn here.
      </Step>
    );
  return (
    <Step
      title="Draw the codes"
      problem={draw.error ? problemText(draw.error) : undefined}
      actions={
        <Button variant="primary" busy={draw.isPending} busyLabel="Drawing" onClick={() => draw.mutate()}>
          Draw {status.specimenCount} codes
        </Button>
      }
    >
      The program draws a three-digit code for every specimen and puts a sealed commitment on the record, so that nobody
      can change the key afterwards. Nothing is shown yet.
    </Step>
  );
}

function SleeveStep({ organisationId, status, labelsTo }: HolderStepsProps) {
  const [isAsking, setAsking] = useState(false);
  const confirm = useConfirmCodes(organisationId, status.studyId);
  return (
    <Step
      title="Print the labels, sleeve and code the specimens"
      actions={
        <>
          <LinkButton variant={status.openings.length === 0 ? 'primary' : 'plain'} to={labelsTo}>
            Go to the labels
          </LinkButton>
          <Button
            variant={status.openings.length === 0 ? 'plain' : 'primary'}
            disabled={status.openings.length === 0}
            onClick={() => setAsking(true)}
          >
            All are sleeved and coded
          </Button>
        </>
      }
    >
      {status.openings.length === 0
        ? 'The code sheet has not been opened yet. Each opening goes on the record with your name and the time.'
        : 'When every specimen wears its sleeve and the same code at both ends, say so here. Sessions can open from then on.'}
      <ConfirmDialog
        isOpen={isAsking}
        onOpenChange={(next) => {
          confirm.reset();
          setAsking(next);
        }}
        title="Is every specimen sleeved and coded?"
        consequence={`All ${status.specimenCount} specimens are sleeved over their whole length, their connectors are masked, and the same code is at both ends. Your confirmation goes on the record.`}
        confirmWord="Yes, every one"
        keepWord="Not yet"
        busy={confirm.isPending}
        problem={confirm.error ? problemText(confirm.error) : undefined}
        onConfirm={() => confirm.mutate(undefined, { onSuccess: () => setAsking(false) })}
      />
    </Step>
  );
}

type StepProps = { title: string; problem?: string | undefined; actions: ReactNode; children: ReactNode };

function Step({ title, problem, actions, children }: StepProps) {
  return (
    <section
      aria-labelledby="codes-step"
      className="flex flex-col gap-5 border-t-2 border-b border-t-ink border-b-rule py-6"
    >
      <div className="flex max-w-3xl flex-col gap-2">
        <h2 id="codes-step" className="text-2xl">
          {title}
        </h2>
        <div className="text-lg text-soft">{children}</div>
      </div>
      <div role="alert" className="empty:hidden">
        {problem ? <Notice tone="amber">{problem}</Notice> : null}
      </div>
      <div className="flex flex-wrap gap-3 print:hidden">{actions}</div>
    </section>
  );
}
