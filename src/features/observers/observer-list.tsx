import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { type ObserverDraft, type ObserverRow, observerDraft } from '#shared/contracts/observers.ts';
import { problemText, showProblem } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { ConfirmDialog } from '../../ui/confirm-dialog.tsx';
import { Form } from '../../ui/form.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import { TextField } from '../../ui/text-field.tsx';
import { usePlanObserver, useWithdrawObserver } from './observers.queries.ts';

type ObserverListProps = {
  organisationId: string;
  sessionId: string;
  rows: readonly ObserverRow[];
  /** Managers ask, until the session is over. */
  canChange: boolean;
};

/** Who watches the session as a witness, and the form to ask somebody. */
export function ObserverList({ organisationId, sessionId, rows, canChange }: ObserverListProps) {
  return (
    <section aria-labelledby="observers" className="flex flex-col gap-6">
      <div className="flex max-w-3xl flex-col gap-1.5">
        <h2 id="observers" className="text-2xl">
          Observers
        </h2>
        <p className="text-soft">
          A witness watches by a link of their own and signs what they watched. Only somebody without another duty in
          the study makes it witnessed: nobody can vouch for their own work.
        </p>
      </div>
      {rows.length === 0 ? (
        <p className="text-soft">Nobody is asked to watch.</p>
      ) : (
        <ul className="max-w-3xl border-t border-rule">
          {rows.map((row) => (
            <li key={row.id} className="flex flex-wrap items-center gap-x-4 gap-y-1 border-b border-rule py-2.5">
              <span className="font-mono">{row.label}</span>
              <span className="min-w-0 flex-1 break-words">
                {row.name}, <span className="text-soft">{row.email}</span>
              </span>
              {row.hasSigned ? <StatusWord tone="held">Signed</StatusWord> : null}
              {canChange && !row.hasSigned ? <Withdraw organisationId={organisationId} row={row} /> : null}
            </li>
          ))}
        </ul>
      )}
      {canChange ? <AskObserver organisationId={organisationId} sessionId={sessionId} /> : null}
    </section>
  );
}

function AskObserver({ organisationId, sessionId }: Pick<ObserverListProps, 'organisationId' | 'sessionId'>) {
  const form = useForm<ObserverDraft>({ resolver: zodResolver(observerDraft), defaultValues: { name: '', email: '' } });
  const plan = usePlanObserver(organisationId, sessionId);
  async function submit(draft: ObserverDraft) {
    try {
      await plan.mutateAsync(draft);
      form.reset();
    } catch (error) {
      showProblem(form, error);
    }
  }
  return (
    <Form
      form={form}
      onSubmit={submit}
      aria-label="Ask somebody to watch"
      className="max-w-xl"
      actions={
        <Button type="submit" busy={form.formState.isSubmitting} busyLabel="Sending" className="self-start">
          Send the link
        </Button>
      }
    >
      <TextField {...form.register('name')} label="Observer’s name" error={form.formState.errors.name?.message} />
      <TextField
        {...form.register('email')}
        label="Observer’s e-mail"
        type="email"
        error={form.formState.errors.email?.message}
      />
    </Form>
  );
}

function Withdraw({ organisationId, row }: { organisationId: string; row: ObserverRow }) {
  const [isAsked, setAsked] = useState(false);
  const withdraw = useWithdrawObserver(organisationId);
  return (
    <>
      <Button variant="quiet" onClick={() => setAsked(true)} aria-label={`Withdraw ${row.name}`}>
        Withdraw
      </Button>
      <ConfirmDialog
        isOpen={isAsked}
        onOpenChange={setAsked}
        title="End this observer’s link?"
        consequence={`${row.name} can watch no longer. What the record says of their presence stays.`}
        confirmWord="End the link"
        keepWord="Keep it"
        busy={withdraw.isPending}
        {...(withdraw.isError ? { problem: problemText(withdraw.error) } : {})}
        onConfirm={() => withdraw.mutate(row.id, { onSuccess: () => setAsked(false) })}
      />
    </>
  );
}
