import type { ObserverView } from '#shared/contracts/observer-live.ts';

/** "You watched trials 1 to 16 from their opening to their end." */
export function watchedWords({ watched }: Pick<ObserverView, 'watched'>): string {
  const [first, last] = [watched[0], watched.at(-1)];
  if (first === undefined || last === undefined) return 'You have watched no trial to its end yet.';
  if (first === last) return `You watched trial ${first} from its opening to its end.`;
  const isWhole = watched.length === last - first + 1;
  return isWhole
    ? `You watched trials ${first} to ${last} from their opening to their end.`
    : `You watched ${watched.length} trials between ${first} and ${last} from their opening to their end.`;
}

const stageWords = {
  change: 'A cable is being changed',
  listening: 'Everybody listens',
  answering: 'Listeners answer',
  asking: 'The listener asks or answers',
};

/** What happens now, in a line and the smaller print below. */
export function nowWords(view: ObserverView): { title: string; detail: string } {
  const { phase, paused, trial } = view;
  if (phase === 'finished' || phase === 'abandoned')
    return {
      title: phase === 'finished' ? 'The session is over' : 'The session ended early',
      detail: watchedWords(view),
    };
  if (paused !== null)
    return {
      title: paused.reason === 'break' ? 'Break' : paused.reason === 'too-loud' ? 'Paused: too loud' : 'Paused',
      detail: 'Nothing goes on until the proctor resumes.',
    };
  if (phase === 'planned')
    return { title: 'Before the session', detail: 'Seating is not open yet. Keep this page open.' };
  if (phase === 'seating')
    return { title: 'Listeners take their seats', detail: 'The run begins once all are seated.' };
  if (phase === 'revealing') return { title: 'The phones fix the draw', detail: 'Nobody sees it before closing.' };
  if (trial === null) return { title: 'Between trials', detail: watchedWords(view) };
  const which = trial.familiarisation ? 'Not counted, to get to know it' : `Trial ${trial.number} of ${trial.of}`;
  return {
    title: stageWords[trial.stage],
    detail:
      trial.stage === 'answering' || trial.stage === 'asking'
        ? `${which}.`
        : `${which}, presentation ${trial.presentationNumber} of ${trial.presentations}${trial.presentation === '' ? '' : `: ${trial.presentation}`}.`,
  };
}
