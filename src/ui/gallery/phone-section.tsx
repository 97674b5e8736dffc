import { useState } from 'react';
import { Button } from '../button.tsx';
import { OptionList } from '../option-list.tsx';
import { Segmented } from '../segmented.tsx';
import { GallerySection } from './gallery-section.tsx';

const answers = [
  { value: 'a', letter: 'A', sentence: 'X was the same as A' },
  { value: 'b', letter: 'B', sentence: 'X was the same as B' },
];

const confidences = [
  { value: 'guessing', label: 'Guessing' },
  { value: 'fairly', label: 'Fairly' },
  { value: 'certain', label: 'Certain' },
];

export function PhoneSection() {
  const [answer, setAnswer] = useState<string | null>('b');
  const [confidence, setConfidence] = useState<string | null>('fairly');
  return (
    <GallerySection title="Answers on a phone" note="One ruled list; rows of 120 px, or 88 where the screen is low.">
      <div className="-mx-5 flex max-w-[26rem] flex-col gap-5 sm:mx-0">
        <OptionList legend="Which one did X match?" options={answers} value={answer} onChange={setAnswer} />
        <div className="flex flex-col gap-5 px-5">
          <Segmented legend="How sure are you?" options={confidences} value={confidence} onChange={setConfidence} />
          <Button variant="primary" size="touch" disabled={answer === null}>
            Send {answer?.toUpperCase()}
          </Button>
          <Button size="touch">Too loud</Button>
          <Button variant="quiet">Leave the session</Button>
        </div>
      </div>
    </GallerySection>
  );
}
