import { useState } from 'react';
import { type Confidence, confidences, type ListenerView } from '#shared/contracts/listener-live.ts';
import { Button } from '../ui/button.tsx';
import { OptionList } from '../ui/option-list.tsx';
import { Segmented } from '../ui/segmented.tsx';
import { capitalised, type OwnAnswer, shortOf } from './answers.ts';

type QuestionProps = {
  question: ListenerView['question'];
  own: OwnAnswer | null;
  onSend: (choice: string, confidence: Confidence | null) => void;
};

const sureness = confidences.map((value) => ({ value, label: `${value.charAt(0).toUpperCase()}${value.slice(1)}` }));
const isConfidence = (value: string): value is Confidence => confidences.some((known) => known === value);

/** Below this height the confidence has a step of its own; fixed when the question appears, so that nothing jumps. */
const isLow = (options: number) => window.matchMedia(`(max-height: ${options > 2 ? 919 : 699}px)`).matches;

const column = 'flex flex-1 flex-col gap-5 py-4 [@media(max-height:699px)]:gap-3 [@media(max-height:699px)]:py-2';

/** The question of a trial: one list, and, where the protocol asks it, how sure the listener is. */
export function Question({ question, own, onSend }: QuestionProps) {
  const [choice, setChoice] = useState<string | null>(own?.choice ?? null);
  const [confidence, setConfidence] = useState<Confidence | null>(own?.confidence ?? null);
  const [inTwoSteps] = useState(() => question.confidence && isLow(question.options.length));
  const [step, setStep] = useState<'choice' | 'confidence'>('choice');

  const isReady = choice !== null && (!question.confidence || confidence !== null);
  const send = (
    <Button
      variant="primary"
      size="touch"
      disabled={!isReady}
      onClick={() => (choice === null ? undefined : onSend(choice, confidence))}
    >
      {choice === null ? 'Choose one' : `Send ${shortOf(question, choice)}`}
    </Button>
  );
  const howSure = (
    <Segmented
      legend="How sure are you?"
      options={sureness}
      value={confidence}
      onChange={(value) => setConfidence(isConfidence(value) ? value : null)}
    />
  );

  if (step === 'confidence')
    return (
      <div className={column}>
        <h1 className="text-2xl">{question.options.find(({ value }) => value === choice)?.sentence}</h1>
        {howSure}
        {send}
        <Button variant="quiet" size="touch" onClick={() => setStep('choice')}>
          Back to the question
        </Button>
      </div>
    );
  return (
    <div className={column}>
      <h1 className="text-2xl [@media(max-height:699px)]:text-xl">{question.text}</h1>
      <div className="-mx-5 max-[389px]:[&_label]:gap-3 max-[389px]:[&_label]:px-4">
        <OptionList legend={question.text} options={question.options} value={choice} onChange={setChoice} />
      </div>
      {inTwoSteps ? (
        <Button variant="primary" size="touch" disabled={choice === null} onClick={() => setStep('confidence')}>
          {choice === null ? 'Choose one' : `${capitalised(shortOf(question, choice))}, and how sure?`}
        </Button>
      ) : (
        <>
          {question.confidence ? howSure : null}
          {send}
        </>
      )}
    </div>
  );
}
