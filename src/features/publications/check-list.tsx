import type { Check } from '#shared/ledger/verify.ts';
import { classNames } from '../../ui/class-names.ts';
import { StatusWord } from '../../ui/status-word.tsx';
import type { Verification } from './use-verification.ts';

type State = Check['outcome'] | 'checking' | 'to do';

const tones: Record<State, 'held' | 'stop' | 'amber' | 'now' | 'neutral'> = {
  pass: 'held',
  fail: 'stop',
  'not checkable': 'amber',
  checking: 'now',
  'to do': 'neutral',
};

const rings: Record<State, string> = {
  pass: 'border-jacket bg-jacket',
  fail: 'border-stop bg-page',
  'not checkable': 'border-amber bg-page',
  checking: 'border-copper bg-page',
  'to do': 'border-edge bg-page',
};

type CheckListProps = Pick<Verification, 'names' | 'checks'> & { isRunning: boolean };

/** Every check from the first, those to come as well; each with its outcome in a word and its reason in a sentence. */
export function CheckList({ names, checks, isRunning }: CheckListProps) {
  return (
    <ol>
      {names.map(({ id, name }, index) => {
        const check = checks.find((candidate) => candidate.id === id);
        const state: State = check?.outcome ?? (isRunning && index === checks.length ? 'checking' : 'to do');
        return (
          <li key={id} data-check={id} data-outcome={state} className="group relative flex gap-4 pb-5 last:pb-0">
            <span
              aria-hidden="true"
              className={classNames(
                'absolute top-4 -bottom-1 left-[0.4375rem] w-1 group-last:hidden',
                state === 'pass' ? 'bg-jacket' : 'bg-rule',
              )}
            />
            <span
              aria-hidden="true"
              className={classNames('relative mt-1 size-[1.125rem] shrink-0 rounded-full border-4', rings[state])}
            />
            <span className="min-w-0 flex-1">
              <span className="flex flex-wrap justify-between gap-x-6">
                <span
                  className={classNames('min-w-0 flex-1 basis-44', state === 'to do' ? 'text-soft' : 'font-semibold')}
                >
                  {name}
                </span>
                <StatusWord tone={tones[state]}>{state}</StatusWord>
              </span>
              {check ? (
                <span className="block max-w-2xl text-soft [overflow-wrap:anywhere]">{check.reason}</span>
              ) : null}
            </span>
          </li>
        );
      })}
    </ol>
  );
}
