import { useState } from 'react';
import { statementsUnderTheLight } from '#shared/cables/statements/statements-under-the-light.ts';
import type { Cable } from '#shared/contracts/cables.ts';
import { type Evidence, evidenceApi } from '#shared/contracts/evidence.ts';
import { addressOf } from '../../lib/call.ts';
import { formatDate } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { useToast } from '../../ui/toast.tsx';
import { AnswerDialog } from './answer-dialog.tsx';
import { useAddEvidence } from './evidence.queries.ts';

type StatementsProps = { organisationId: string; cable: Cable; evidence: readonly Evidence[] };

/** What of a cable's statements deserves a second look, with why, and what answers it. Nothing is blocked by it. */
export function Statements({ organisationId, cable, evidence }: StatementsProps) {
  const found = statementsUnderTheLight(cable);
  const [asked, setAsked] = useState<string | null>(null);
  const add = useAddEvidence(organisationId, cable.id);
  const showToast = useToast();
  if (found.length === 0) return null;
  return (
    <section aria-labelledby="statements" className="flex flex-col gap-4">
      <div>
        <h2 id="statements" className="pb-1 text-xl">
          Statements under the light
        </h2>
        <p className="text-soft">
          A hostile reader will ask about these. They block nothing; each can be answered with a file.
        </p>
      </div>
      <ul className="border-t-2 border-ink">
        {found.map(({ rule, title, detail, reason, source }) => (
          <li key={rule} className="flex flex-col gap-2 border-b border-rule py-4">
            <p className="max-w-3xl">
              <strong className="font-bold text-amber">{title}.</strong> {detail}
            </p>
            <details>
              <summary className="inline-flex min-h-8 cursor-pointer items-center rounded underline underline-offset-4 hover:decoration-2">
                Why<span className="sr-only">: {title}</span>
              </summary>
              <p className="max-w-3xl">{reason}</p>
              <p className="max-w-3xl text-soft">{source}.</p>
            </details>
            <AnswerList
              answers={evidence.filter((each) => each.rule === rule)}
              hrefOf={(evidenceId) => addressOf(evidenceApi.file, { organisationId, id: cable.id, evidenceId })}
            />
            <Button className="self-start" onClick={() => setAsked(rule)}>
              Answer with evidence<span className="sr-only">: {title}</span>
            </Button>
          </li>
        ))}
      </ul>
      <AnswerDialog
        title={found.find(({ rule }) => rule === asked)?.title ?? null}
        onClose={() => setAsked(null)}
        save={async ({ note, file }) => {
          await add.mutateAsync({ rule: asked ?? '', note, file });
          showToast('The evidence is kept.', 'held');
        }}
      />
    </section>
  );
}

function AnswerList({ answers, hrefOf }: { answers: readonly Evidence[]; hrefOf: (id: string) => string }) {
  if (answers.length === 0) return null;
  return (
    <ul className="border-l-[5px] border-jacket pl-4">
      {answers.map(({ id, note, file, addedAt }) => (
        <li key={id} className="py-1">
          {note}{' '}
          <a href={hrefOf(id)} className="[overflow-wrap:anywhere]">
            {file.name}
          </a>
          <span className="text-soft">, {formatDate(addedAt)}</span>
        </li>
      ))}
    </ul>
  );
}
