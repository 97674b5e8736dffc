import { useState } from 'react';
import type { Caution, ProctorView } from '#shared/contracts/proctor-live.ts';
import { Button } from '../../ui/button.tsx';
import { CheckboxField } from '../../ui/checkbox-field.tsx';
import { cautionWords } from './console-words.ts';
import type { ConsoleActions } from './use-console.ts';

/** What must be read and ticked before anybody is seated. */
export function Cautions({ view, act, isBusy }: { view: ProctorView } & Pick<ConsoleActions, 'act' | 'isBusy'>) {
  const { cautions } = view;
  const [ticked, setTicked] = useState<readonly Caution[]>([]);
  const toggle = (caution: Caution) =>
    setTicked(ticked.includes(caution) ? ticked.filter((other) => other !== caution) : [...ticked, caution]);
  const left = cautions.length - ticked.length;
  return (
    <section className="flex max-w-[54rem] flex-1 flex-col gap-4">
      <h2 className="text-step font-bold">Before anybody is seated</h2>
      <div>
        {cautions.map((caution) => (
          <CautionRow
            key={caution}
            {...cautionWords(caution, view.rig)}
            isTicked={ticked.includes(caution)}
            onToggle={() => toggle(caution)}
          />
        ))}
      </div>
      <div className="mt-auto flex flex-col gap-3 pt-2">
        <p role="status" className="text-soft">
          {left === 0
            ? view.rehearsal
              ? 'In a rehearsal nothing goes on a record.'
              : 'Your confirmation goes on the record.'
            : `${left} of ${cautions.length} still to be read and ticked.`}
        </p>
        <Button
          variant="primary"
          size="large"
          disabled={left > 0}
          busy={isBusy}
          className="text-2xl"
          onClick={() => void act({ kind: 'confirm-cautions', items: [...ticked] })}
        >
          Confirm the cautions
        </Button>
      </div>
    </section>
  );
}

type CautionRowProps = { name: string; rule: string; isTicked: boolean; onToggle: () => void };

function CautionRow({ name, rule, isTicked, onToggle }: CautionRowProps) {
  const words = (
    <span className="grid gap-x-6 sm:grid-cols-[7rem_1fr]">
      <strong>{name}</strong> <span className={isTicked ? 'text-soft' : ''}>{rule}</span>
    </span>
  );
  return <CheckboxField label={words} checked={isTicked} onChange={onToggle} className="border-b border-rule" />;
}
