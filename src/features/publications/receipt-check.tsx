import { type FormEvent, useId, useState } from 'react';
import { Button } from '../../ui/button.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import { TextAreaField } from '../../ui/text-area-field.tsx';
import type { Verification } from './use-verification.ts';
import type { ReceiptsOutcome } from './verify-worker.ts';

type ReceiptCheckProps = {
  verification: Verification;
  onText: (text: string) => void;
  /** The level of its heading. */
  level: 2 | 3;
};

/** For a listener who kept what the phone showed: whether the record that was just checked holds it. */
export function ReceiptCheck({ verification, onText, level }: ReceiptCheckProps) {
  const { phase, checks, receipts } = verification;
  const [text, setText] = useState('');
  const [isEmpty, setEmpty] = useState(false);
  const id = useId();
  const Heading = `h${level}` as const;
  const isRecordWhole = checks.some((check) => check.id === 'record' && check.outcome === 'pass');

  function submit(event: FormEvent): void {
    event.preventDefault();
    setEmpty(text.trim() === '');
    if (text.trim() !== '') onText(text);
  }

  return (
    <section aria-labelledby={id} className="flex flex-col gap-3 border-t-2 border-ink pt-4 print:hidden">
      <Heading id={id} className="text-base font-bold">
        Check a phone’s receipts
      </Heading>
      <p className="text-soft">
        Whoever listened can copy receipts from the phone and look each up in the record that was checked here. They
        stay in this browser.
      </p>
      {phase === 'done' && isRecordWhole ? (
        <form onSubmit={submit} noValidate className="flex flex-col items-start gap-3">
          <TextAreaField
            label="Receipts"
            name="receipts"
            hint="Paste the whole text, from the title on."
            error={isEmpty ? 'Paste the text that the phone copied.' : undefined}
            rows={4}
            spellCheck={false}
            autoComplete="off"
            className="w-full"
            value={text}
            onChange={({ target }) => setText(target.value)}
          />
          <Button type="submit">Look them up</Button>
          <div role="status" className="w-full">
            {receipts === null ? null : <Found outcome={receipts} />}
          </div>
        </form>
      ) : (
        <p>
          {phase === 'done'
            ? 'This record is broken, so that nothing can be looked up in it.'
            : 'A record has to be checked first.'}
        </p>
      )}
    </section>
  );
}

function Found({ outcome: { found, notHeld } }: { outcome: ReceiptsOutcome }) {
  const held = found.filter(({ isOnRecord }) => isOnRecord).length;
  return (
    <div className="flex flex-col gap-2">
      <p className="font-semibold">
        {found.length === 0
          ? 'There is no receipt in this text. One has a trial, a leaf and an entry.'
          : held === found.length
            ? `All ${found.length} are on this record.`
            : `${held} of ${found.length} are on this record.`}
      </p>
      <ul className="flex flex-col gap-2">
        {found.map(({ trial, isOnRecord, words }) => (
          <li key={`${trial} ${words}`} className="border-b border-rule pb-2 [overflow-wrap:anywhere]">
            <span className="flex justify-between gap-4">
              Trial {trial}
              <StatusWord tone={isOnRecord ? 'held' : 'stop'}>{isOnRecord ? 'found' : 'not on this record'}</StatusWord>
            </span>
            <span className="text-soft">{words.charAt(0).toUpperCase() + words.slice(1)}</span>
          </li>
        ))}
      </ul>
      {notHeld === 0 ? null : (
        <p className="text-soft">
          {notHeld === 1 ? 'One answer' : `${notHeld} answers`} in it the phone sent and the server did not hold: that
          is no receipt, and no record can show it.
        </p>
      )}
    </div>
  );
}
