import type { ProctorView } from '#shared/contracts/proctor-live.ts';

type Trial = NonNullable<ProctorView['trial']>;

/** What is to be played next and from where, large and from the start of the change, so that it can be lined up in time. */
export function PlayLine({ trial }: { trial: Trial }) {
  if (trial.stage === 'answering') return null;
  const from = trial.excerptStart === '' ? 'from its beginning' : `from ${trial.excerptStart}`;
  return (
    <p className="flex flex-wrap items-baseline gap-x-3 gap-y-1 text-2xl leading-tight">
      <span className="text-soft">{trial.stage === 'change' ? 'Play next' : 'Playing'}</span>
      <strong className="min-w-0 break-words">{trial.excerpt}</strong>
      <span>
        {from}, {trial.excerptS} s
      </span>
    </p>
  );
}
