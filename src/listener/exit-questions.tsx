import { useState } from 'react';
import type { ListenerView } from '#shared/contracts/listener-live.ts';
import { type ExitAnswers, exitLimits } from '#shared/contracts/remarks.ts';
import { Button } from '../ui/button.tsx';
import { Segmented } from '../ui/segmented.tsx';
import { TextAreaField } from '../ui/text-area-field.tsx';
import { remarkAbout } from './remarks.ts';
import type { Seat, SeatSnapshot } from './seat.ts';

type ExitQuestionsProps = { seat: Seat; exit: NonNullable<ListenerView['exit']>; snapshot: SeatSnapshot };

/** What became of the answers, or null while there are none. */
function sentWords({ exit, snapshot }: Omit<ExitQuestionsProps, 'seat'>): string | null {
  const own = remarkAbout(snapshot.remarks, 'exit');
  if (own?.state === 'here') return 'Still on this phone. It is sent by itself when the network is back.';
  if (own?.state === 'refused') return own.why;
  if (exit.held === null) return null;
  return own !== null && own.leaf !== exit.held
    ? 'The server holds something else than this phone sent. Tell the proctor.'
    : 'Held by the server. Nobody reads it before the study is closed.';
}

/** Asked once, after the last trial; every question may be left empty. What is typed survives a reload. */
export function ExitQuestions({ seat, exit, snapshot }: ExitQuestionsProps) {
  const [answers, setAnswers] = useState<ExitAnswers>(snapshot.exitDraft);
  const sent = sentWords({ exit, snapshot });
  if (sent !== null)
    return (
      <section className="flex flex-col gap-2" role="status">
        <h2 className="text-xl">What you said</h2>
        <p className="text-soft">{sent}</p>
      </section>
    );
  const change = (part: Partial<ExitAnswers>) => {
    const changed = { ...answers, ...part };
    setAnswers(changed);
    seat.draftExit(changed);
  };
  const guess = (place: number, text: string) =>
    change({ guesses: exit.guesses.map((_, index) => (index === place ? text : (answers.guesses[index] ?? ''))) });
  const isEmpty =
    answers.noticed === null && [answers.wentBy, answers.what, ...answers.guesses].every((text) => text.trim() === '');
  return (
    <section className="flex flex-col gap-6">
      <div className="flex flex-col gap-2">
        <h2 className="text-xl">A few questions</h2>
        <p className="text-soft">
          Leave out what you like. Nobody reads it before the study is closed; then it is published by your seat label.
          Please write no names.
        </p>
      </div>
      <TextAreaField
        label="What did you go by?"
        rows={2}
        maxLength={exitLimits.wentBy}
        value={answers.wentBy}
        onChange={(event) => change({ wentBy: event.target.value })}
      />
      <Segmented
        legend="Did you hear, see or feel anything but the music?"
        options={[
          { value: 'no', label: 'No' },
          { value: 'yes', label: 'Yes' },
        ]}
        value={answers.noticed}
        onChange={(value) => change({ noticed: value === 'yes' ? 'yes' : 'no' })}
      />
      {answers.noticed === 'yes' ? (
        <TextAreaField
          label="What was it?"
          rows={2}
          maxLength={exitLimits.what}
          value={answers.what}
          onChange={(event) => change({ what: event.target.value })}
        />
      ) : null}
      {exit.guesses.map((question, place) => (
        <TextAreaField
          key={question}
          label={question}
          rows={1}
          maxLength={exitLimits.guess}
          value={answers.guesses[place] ?? ''}
          onChange={(event) => guess(place, event.target.value)}
        />
      ))}
      <Button variant="primary" size="touch" disabled={isEmpty} onClick={() => seat.sendExit(answers)}>
        {isEmpty ? 'Answer what you like' : 'Send'}
      </Button>
    </section>
  );
}
