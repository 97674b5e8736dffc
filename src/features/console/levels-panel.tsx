import { useState } from 'react';
import { Link } from 'react-router-dom';
import type { ProctorView } from '#shared/contracts/proctor-live.ts';
import { levelCheckWords } from '#shared/levels/measured-levels.ts';
import { Button } from '../../ui/button.tsx';
import { ConfirmDialog } from '../../ui/confirm-dialog.tsx';
import { StatusWord } from '../../ui/status-word.tsx';
import type { ConsoleActions } from './use-console.ts';

type Levels = NonNullable<ProctorView['levels']>;

type LevelsPanelProps = {
  levels: Levels;
  phase: ProctorView['phase'];
  /** Where levels are entered, and who measures is named. */
  levelsTo: string;
  actions: Pick<ConsoleActions, 'act' | 'isBusy' | 'problem' | 'forgetProblem'>;
};

/** How the levels stand: in or out, never a figure; and what to do where they are due. */
export function LevelsPanel({ levels, phase, levelsTo, actions }: LevelsPanelProps) {
  const { checks, due, bar } = levels;
  return (
    <section
      aria-label="Levels"
      className={`flex flex-wrap items-center justify-between gap-x-8 gap-y-2 border-l-[5px] py-1 pl-4 ${due === null && bar === null ? 'border-jacket' : 'border-amber'}`}
    >
      <div className="flex min-w-0 flex-col gap-1" aria-live="polite">
        <p className="flex flex-wrap gap-x-5">
          <strong>Levels at the load</strong>
          {checks.map(({ check, isIn, at }) => (
            <span key={`${check} ${at}`} className="flex gap-2">
              {levelCheckWords[check]} <Standing isIn={isIn} />
            </span>
          ))}
        </p>
        {bar === null ? <DueWords due={due} /> : <p>{bar}</p>}
      </div>
      <div className="flex flex-wrap gap-3">
        {due === 'half-time' && phase === 'running' ? <GoOnWithout actions={actions} /> : null}
        <Link to={levelsTo} className="inline-flex min-h-11 items-center underline underline-offset-4">
          Open the levels
        </Link>
      </div>
    </section>
  );
}

function Standing({ isIn }: { isIn: boolean | null }) {
  if (isIn === null) return <StatusWord tone="amber">not measured</StatusWord>;
  return <StatusWord tone={isIn ? 'held' : 'amber'}>{isIn ? 'in' : 'out'}</StatusWord>;
}

function DueWords({ due }: Pick<Levels, 'due'>) {
  if (due === null) return null;
  if (due === 'half-time') return <p>Half of the trials are over: have the levels measured before you go on.</p>;
  return <p>Levels {levelCheckWords[due]} are due. Whoever measures enters them; you see “in” or “out” here.</p>;
}

function GoOnWithout({ actions }: Pick<LevelsPanelProps, 'actions'>) {
  const [isOpen, setOpen] = useState(false);
  return (
    <>
      <Button
        onClick={() => {
          actions.forgetProblem();
          setOpen(true);
        }}
      >
        Go on without
      </Button>
      <ConfirmDialog
        isOpen={isOpen}
        onOpenChange={setOpen}
        title="Go on without measuring at half time?"
        consequence="That is a deviation from the protocol. It goes on the record and into the report."
        confirmWord="Go on without"
        keepWord="Have them measured"
        reason={{ label: 'Why are they not measured?' }}
        busy={actions.isBusy}
        {...(actions.problem === null ? {} : { problem: actions.problem })}
        onConfirm={(reason) =>
          void actions.act({ kind: 'skip-levels', reason }).then((isDone) => isDone && setOpen(false))
        }
      />
    </>
  );
}
