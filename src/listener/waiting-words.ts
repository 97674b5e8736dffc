import type { ListenerView } from '#shared/contracts/listener-live.ts';
import { answerTo, capitalised, shortOf } from './answers.ts';
import type { SeatSnapshot } from './seat.ts';

/** `more` is the smaller print below. */
type Said = { readonly title: string; readonly detail: string; readonly more?: string };

export const pauseWords: Record<NonNullable<ListenerView['paused']>, Said> = {
  break: { title: 'Break', detail: 'Rest your ears. The session goes on from here.' },
  'too-loud': { title: 'Paused: too loud', detail: 'The proctor turns it down before anything goes on.' },
  trouble: { title: 'Paused', detail: 'Something is being put right. The session goes on from here.' },
};

function beforeTheRun({ phase, seat, contributes, question }: ListenerView, hasContribution: boolean): Said {
  if (phase === 'revealing')
    return {
      title: 'The draw is being fixed',
      detail: 'The phones give their random numbers. There is nothing to do.',
    };
  return {
    title: `You are seated as ${seat}`,
    detail: question.explanation,
    more:
      contributes && hasContribution
        ? 'The session starts soon. Your phone’s random number will count in the draw, so that nobody can choose it alone.'
        : 'The session starts soon. Your phone’s random number will not count in the draw; your answers will.',
  };
}

/** What the end of a trial means to this listener; never whether an answer was right. */
function afterTrial({ trial, outcome, counted }: NonNullable<ListenerView['lastOutcome']>, short: string | null): Said {
  if (outcome === 'void')
    return { title: `Trial ${trial} was set aside`, detail: 'A spare takes its place. Rest your ears.' };
  const title = `Trial ${trial} is locked`;
  if (!counted)
    return { title, detail: 'No answer of yours is in it. Rest your ears; you take part in the next trial.' };
  const answer = short === null ? 'Your answer' : `Your answer, ${short},`;
  return { title, detail: `${answer} is in the record. Rest your ears; the next trial follows.` };
}

/** Practice with feedback says what was right; a trial that counts never does. */
function afterPractice({ right, isRight }: NonNullable<ListenerView['told']>): Said {
  const title = isRight === null ? 'No answer this time' : isRight ? 'Right' : 'Not this time';
  return { title, detail: `${right}.`, more: 'This was practice. Your answer is kept nowhere.' };
}

/** What a phone says between trials. */
export function waitingWords(view: ListenerView, { answers, hasContribution }: SeatSnapshot): Said {
  const { lastOutcome, told } = view;
  if (view.phase !== 'running') return beforeTheRun(view, hasContribution);
  if (told !== null) return afterPractice(told);
  if (lastOutcome === null)
    return {
      title: 'Ready',
      detail: view.question.explanation,
      more: view.contributes
        ? 'The draw is fixed, and nobody has seen it. The next step follows.'
        : 'The next step follows. You joined too late for your phone’s random number to count in the draw; your answers count.',
    };
  const own = answerTo(answers, lastOutcome.trial);
  if (own?.state === 'late' && lastOutcome.outcome === 'locked')
    return { title: 'Too late', detail: own.why ?? 'This answer is not counted.' };
  if (own?.state === 'here')
    return {
      title: `${capitalised(shortOf(view.question, own.choice))}, still on this phone`,
      detail: 'It is sent as soon as the server can be reached.',
    };
  return afterTrial(lastOutcome, own?.state === 'held' ? shortOf(view.question, own.choice) : null);
}
