import { useFormContext, useWatch } from 'react-hook-form';
import type { Cable } from '#shared/contracts/cables.ts';
import { Notice } from '../../../ui/notice.tsx';
import { TextAreaField } from '../../../ui/text-area-field.tsx';
import { TextField } from '../../../ui/text-field.tsx';
import { FormSection } from './form-section.tsx';
import { MethodFields } from './method-fields.tsx';
import type { StudyFormValues } from './study-form-values.ts';
import { tellingWords } from './telling-words.ts';

export function QuestionFields({ cables }: { cables: readonly Cable[] }) {
  const { register } = useFormContext<StudyFormValues>();
  return (
    <FormSection title="What it asks">
      <div className="flex flex-col gap-3">
        <TextField
          {...register('title')}
          label="Neutral title"
          autoComplete="off"
          hint="The only name that listeners, proctors and observers ever see. Nothing in it may tell a maker, model, material or price."
        />
        <TellingTitle cables={cables} />
      </div>
      <TextAreaField
        {...register('question')}
        label="Question"
        rows={2}
        hint="What the study is to answer, in one sentence. Never shown to a listener or a proctor."
      />
      <MethodFields />
    </FormSection>
  );
}

/** Said while the title is typed; it never stands in the way of saving. */
function TellingTitle({ cables }: { cables: readonly Cable[] }) {
  const [title, chosen] = useWatch<StudyFormValues, ['title', 'cables']>({ name: ['title', 'cables'] });
  const names = cables.filter(({ id }) => chosen.some(({ cableId }) => cableId === id)).map(({ name }) => name);
  const words = tellingWords(title, names);
  return (
    <div aria-live="polite" className="empty:hidden">
      {words.length > 0 ? (
        <Notice tone="amber" title="Is this title neutral?">
          {words.map((word) => `“${word}”`).join(', ')} {words.length === 1 ? 'is a word' : 'are words'} of a chosen
          cable’s name. Listeners read the title before they listen.
        </Notice>
      ) : null}
    </div>
  );
}
