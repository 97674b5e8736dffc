import { useEffect, useRef, useState } from 'react';
import { useFieldArray, useFormContext, useWatch } from 'react-hook-form';
import { type ChangeStep, stepKinds } from '#shared/contracts/proctor-live.ts';
import type { RigPreset } from '#shared/protocol/rig-preset.ts';
import { shippedPresets } from '#shared/protocol/shipped-presets.ts';
import { Button } from '../../ui/button.tsx';
import { FieldNotes } from '../../ui/field-notes.tsx';
import { useFieldWiring } from '../../ui/field-wiring.ts';
import { kindWords } from './preset-words.ts';
import { StepRow, WaitsInAll } from './step-row.tsx';

/** A step to begin from, in the words of the preset that ships for the rig. */
function newStep(kind: ChangeStep, rig: RigPreset['kind']): RigPreset['steps'][number] {
  const shipped = shippedPresets[rig].steps.find((step) => step.kind === kind);
  const { name, meaning } = kindWords[kind];
  return shipped ?? { kind, leastS: 0, act: name, how: meaning, done: `${name} is done` };
}

/** The steps of a change in their order. */
export function StepFields() {
  const { getValues } = useFormContext<RigPreset>();
  const { fields, insert, remove, move } = useFieldArray<RigPreset, 'steps'>({ name: 'steps' });
  const steps = useWatch<RigPreset, 'steps'>({ name: 'steps' });
  const wiring = useFieldWiring({ name: 'steps' });
  const list = useRef<HTMLOListElement>(null);
  const [news, setNews] = useState({ text: '', focusOn: '' });
  const left = stepKinds.filter((kind) => !steps.some((step) => step.kind === kind));

  useEffect(() => {
    if (news.focusOn !== '') list.current?.querySelector<HTMLElement>(news.focusOn)?.focus();
  }, [news]);

  function moveTo(from: number, to: number) {
    move(from, to);
    const isAtEnd = to === 0 || to === fields.length - 1;
    const act = to < from === isAtEnd ? 'down' : 'up';
    setNews({ text: `Now step ${to + 1} of ${fields.length}.`, focusOn: `[data-act="${act}-${to}"]` });
  }

  function add(kind: ChangeStep) {
    // Where it belongs by the usual order; it can be moved.
    const after = getValues('steps').filter((step) => stepKinds.indexOf(step.kind) < stepKinds.indexOf(kind)).length;
    insert(after, newStep(kind, getValues('kind')));
    setNews({ text: `${kindWords[kind].name} added.`, focusOn: `[data-row="${after}"] input` });
  }

  function drop(index: number) {
    remove(index);
    setNews({ text: `Step ${index + 1} removed.`, focusOn: `[data-row="${Math.max(0, index - 1)}"] input` });
  }

  return (
    <section aria-labelledby="steps-of-a-change" className="flex flex-col gap-6 border-t-2 border-ink pt-5">
      <div className="flex flex-col gap-1">
        <h2 id="steps-of-a-change" className="text-xl">
          Steps of a change
        </h2>
        <p className="text-soft">
          The console shows one at a time, for a real change and for none alike. {'{code}'} in your words stands for the
          blind code. The proctor reads them: name no cable, maker or price.
        </p>
      </div>
      <ol ref={list} className="flex flex-col gap-6">
        {fields.map(({ id }, index) => (
          <StepRow
            key={id}
            index={index}
            count={fields.length}
            onMove={(to) => moveTo(index, to)}
            onRemove={() => drop(index)}
          />
        ))}
      </ol>
      <FieldNotes wiring={wiring} />
      <WaitsInAll />
      {left.length === 0 ? null : (
        <div className="flex flex-wrap items-center gap-3">
          <span>Add a step:</span>
          {left.map((kind) => (
            <Button key={kind} onClick={() => add(kind)}>
              {kindWords[kind].name}
            </Button>
          ))}
        </div>
      )}
      <p role="status" className="sr-only">
        {news.text}
      </p>
    </section>
  );
}
