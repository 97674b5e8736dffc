import { useEffect, useRef, useState } from 'react';
import { useFieldArray, useFormContext } from 'react-hook-form';
import { Button } from '../../../ui/button.tsx';
import { FieldNotes } from '../../../ui/field-notes.tsx';
import { useFieldWiring } from '../../../ui/field-wiring.ts';
import { ExcerptRow } from './excerpt-row.tsx';
import { FormSection } from './form-section.tsx';
import type { StudyFormValues } from './study-form-values.ts';

const mostExcerpts = 12;

/** The excerpts in the order in which trials take them up. */
export function ProgrammeFields() {
  const { setFocus } = useFormContext<StudyFormValues>();
  const { fields, append, remove, move } = useFieldArray<StudyFormValues, 'programme'>({ name: 'programme' });
  const wiring = useFieldWiring({ name: 'programme' });
  const list = useRef<HTMLOListElement>(null);
  const [news, setNews] = useState({ text: '', focusOn: '' });

  useEffect(() => {
    if (news.focusOn !== '') list.current?.querySelector<HTMLElement>(news.focusOn)?.focus();
  }, [news]);

  function moveTo(from: number, to: number) {
    move(from, to);
    const isAtEnd = to === 0 || to === fields.length - 1;
    const act = to < from === isAtEnd ? 'down' : 'up';
    setNews({ text: `Now excerpt ${to + 1} of ${fields.length}.`, focusOn: `[data-act="${act}-${to}"]` });
  }

  function drop(index: number) {
    remove(index);
    setNews({ text: `Excerpt ${index + 1} removed.`, focusOn: `[data-row="${Math.max(0, index - 1)}"] input` });
  }

  function add() {
    append({ title: '', start: '0:00', lengthS: 20 }, { shouldFocus: false });
    setNews({ text: '', focusOn: '' });
    queueMicrotask(() => setFocus(`programme.${fields.length}.title`));
  }

  return (
    <FormSection
      title="Programme"
      lede="Trials take the excerpts in turn. The same piece may come more than once; 10 to 20 seconds from the same point, without fades, serve best."
    >
      <ol ref={list} className="flex flex-col gap-5">
        {fields.map((row, index) => (
          <ExcerptRow
            key={row.id}
            index={index}
            count={fields.length}
            onMove={(to) => moveTo(index, to)}
            onRemove={() => drop(index)}
          />
        ))}
      </ol>
      <FieldNotes wiring={wiring} />
      <output className="sr-only">{news.text}</output>
      <div>
        <Button onClick={add} disabled={fields.length >= mostExcerpts}>
          Add an excerpt
        </Button>
      </div>
    </FormSection>
  );
}
