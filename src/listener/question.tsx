import { useState } from 'react';
import { type Confidence, confidences, type ListenerView } from '#shared/contracts/listener-live.ts';
import { Button } from '../ui/button.tsx';
import { OptionList } from '../ui/option-list.tsx';
import { Segmented } from '../ui/segmented.tsx';
import type { OwnAnswer } from './answers.ts';

type QuestionProps = {
  question: ListenerView['question'];
  own: OwnAnswer | null;
  isChanging: boolean;
  onChange: () => void;
  onSend: (choice: string, confidence: Confidence | null) => void;
};

const sure = confidences.map((value) => ({ value, label: value[0]?.toUpperCase() + value.slice(1) }));
const isConfidence = (value: string): value is Confidence => confidences.some((known) => known === value);

/** The question of a trial, and after it what became of the answer. */
export function Question({ question, own, isChanging, onChange, onSend }: QuestionProps) {
  const [choice, setChoice] = useState<string | null>(own?.choice ?? null);
  const [confidence, setConfidence] = useState<Confidence | null>(own?.confidence ?? null);
  if (own !== null && !isChanging) return <Sent own={own} onChange={onChange} />;
  const isReady = choice !== null && (!question.confidence || confidence !== null);
  return (
    <div className="flex flex-1 flex-col gap-5 py-4">
      <h1 className="text-2xl">{question.text}</h1>
      <div className="-mx-5">
        <OptionList legend={question.text} options={question.options} value={choice} onChange={setChoice} />
      </div>
      {question.confidence ? (
        <Segmented
          legend="How sure are you?"
          options={sure}
          value={confidence}
          onChange={(value) => setConfidence(isConfidence(value) ? value : null)}
        />
      ) : null}
      <Button
        variant="primary"
        size="touch"
        disabled={!isReady}
        onClick={() => (choice === null ? undefined : onSend(choice, confidence))}
      >
        {choice === null ? 'Choose one' : `Send ${choice}`}
      </Button>
    </div>
  );
}

const clock = new Intl.DateTimeFormat(undefined, { hour: '2-digit', minute: '2-digit', second: '2-digit' });

function wordsOf({ choice, state, heldAt, why }: OwnAnswer): { title: string; detail: string } {
  if (state === 'held')
    return {
      title: `${choice}, held by the server`,
      detail: `${heldAt === null ? '' : `${clock.format(heldAt)} · `}you can still change it`,
    };
  if (state === 'here')
    return {
      title: `${choice}, still on this phone`,
      detail: 'It is sent by itself as soon as the server can be reached.',
    };
  return { title: 'Too late', detail: why ?? 'This answer is not counted.' };
}

function Sent({ own, onChange }: { own: OwnAnswer; onChange: () => void }) {
  const { title, detail } = wordsOf(own);
  return (
    <div className="flex flex-1 flex-col py-4">
      <div role="status" className="flex flex-1 flex-col items-center justify-center gap-4 text-center">
        <h1 className="text-2xl">{title}</h1>
        <p className="text-xl text-soft">{detail}</p>
        {own.state === 'late' ? null : <p className="text-xl">Rest your ears.</p>}
      </div>
      {own.state === 'late' ? null : (
        <Button size="touch" onClick={onChange}>
          Change the answer
        </Button>
      )}
    </div>
  );
}
