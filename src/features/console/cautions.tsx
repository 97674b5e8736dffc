import { useState } from 'react';
import { type Caution, cautions, type ProctorView } from '#shared/contracts/proctor-live.ts';
import { Button } from '../../ui/button.tsx';
import { cautionWords } from './console-words.ts';
import type { ConsoleActions } from './use-console.ts';

/** What must be read and ticked before anybody is seated. */
export function Cautions({ view, act, isBusy }: { view: ProctorView } & Pick<ConsoleActions, 'act' | 'isBusy'>) {
  const [ticked, setTicked] = useState<readonly Caution[]>([]);
  const toggle = (caution: Caution) =>
    setTicked(ticked.includes(caution) ? ticked.filter((other) => other !== caution) : [...ticked, caution]);
  const left = cautions.length - ticked.length;
  return (
    <section className="flex max-w-[46rem] flex-col gap-6">
      <h2 className="text-step font-bold">Before anybody is seated</h2>
      <div>
        {cautions.map((caution) => (
          <label key={caution} className="flex min-h-16 cursor-pointer items-start gap-4 border-b border-rule py-4">
            <input
              type="checkbox"
              checked={ticked.includes(caution)}
              onChange={() => toggle(caution)}
              className="mt-0.5 size-7 shrink-0 accent-copper"
            />
            <span>{cautionWords(caution, view.rig)}</span>
          </label>
        ))}
      </div>
      <Button
        variant="primary"
        size="large"
        disabled={left > 0}
        busy={isBusy}
        onClick={() => act({ kind: 'confirm-cautions', items: [...ticked] })}
      >
        Confirm the cautions
      </Button>
      <p role="status" className="text-soft">
        {left === 0
          ? 'Your confirmation goes on the record.'
          : `${left} of ${cautions.length} still to be read and ticked.`}
      </p>
    </section>
  );
}
