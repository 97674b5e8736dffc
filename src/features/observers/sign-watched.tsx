import { useState } from 'react';
import type { ObserverCommand, ObserverView } from '#shared/contracts/observer-live.ts';
import { problemText } from '../../lib/show-problem.ts';
import { Button } from '../../ui/button.tsx';
import { CheckboxField } from '../../ui/checkbox-field.tsx';
import { TextAreaField } from '../../ui/text-area-field.tsx';
import { watchedWords } from './observing-words.ts';

type SignWatchedProps = { view: ObserverView; send: (command: ObserverCommand) => Promise<void> };

/** "I watched", in the witness's own words, signed once. */
export function SignWatched({ view, send }: SignWatchedProps) {
  const [remarks, setRemarks] = useState('');
  const [isNamed, setNamed] = useState(false);
  const [isBusy, setBusy] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  if (view.signed)
    return (
      <p role="status" className="text-xl">
        Signed: {watchedWords(view)} It stands on the record. You can close this page.
      </p>
    );
  if (!view.canSign)
    return (
      <p className="text-xl text-soft">
        You watched no trial from its opening to its end, so there is nothing to sign.
      </p>
    );
  const sign = async () => {
    setBusy(true);
    setProblem(null);
    try {
      await send({ kind: 'sign', remarks: remarks.trim(), isNamed });
    } catch (error) {
      setProblem(problemText(error));
    } finally {
      setBusy(false);
    }
  };
  return (
    <section aria-labelledby="sign" className="flex max-w-2xl flex-col gap-5">
      <div className="flex flex-col gap-2">
        <h2 id="sign" className="text-2xl">
          I watched
        </h2>
        <p className="text-soft">{watchedWords(view)} The server measured it by this page’s connection.</p>
      </div>
      <TextAreaField
        label="What did you see?"
        optional
        hint="Such as: nobody spoke, the cables stayed behind the screen. It is published."
        maxLength={1000}
        value={remarks}
        onChange={(event) => setRemarks(event.target.value)}
      />
      <CheckboxField
        label={`My name, ${view.name}, may stand on the record`}
        hint={`Otherwise you stand on it as ${view.observer} alone.`}
        checked={isNamed}
        onChange={(event) => setNamed(event.target.checked)}
      />
      <p role="alert" className="font-semibold text-amber empty:hidden">
        {problem}
      </p>
      <Button variant="primary" busy={isBusy} busyLabel="Signing" onClick={sign} className="self-start">
        Sign that I watched
      </Button>
    </section>
  );
}
