import type { Report } from '#shared/contracts/reports.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { questionsAtExit } from '#shared/session/remark-views.ts';
import type { ReportSource } from './reports.views.ts';

/** What listeners said beside the trials, by label: all of it, nothing chosen. */
export function saidOf({ protocol, states, remarks = [] }: ReportSource): Report['said'] {
  const questions = questionsAtExit(methodOf(protocol.method));
  const numbers = new Map(states.map(({ session, sessionId }) => [sessionId, session]));
  const of = (session: string) => numbers.get(session) ?? 0;
  return {
    exits: remarks.flatMap(({ session, seat, said }) =>
      'fatigue' in said
        ? []
        : [
            {
              session: of(session),
              listener: seat,
              wentBy: said.wentBy,
              noticed: said.noticed,
              what: said.what,
              guesses: said.guesses.map((text, index) => ({ question: questions[index] ?? '', text })),
            },
          ],
    ),
    fatigue: remarks.flatMap(({ session, seat, about, said }) =>
      'fatigue' in said
        ? [{ session: of(session), break: Number(about.split('/')[1]), listener: seat, fatigue: said.fatigue }]
        : [],
    ),
  };
}

/** What an entry says of breaks cut short and of sittings, or null where it says nothing of them. */
export function blockWords(kind: string, payload: { readonly [name: string]: unknown }): string | null {
  if (kind === 'resumed' && typeof payload.early === 'string')
    return `The session went on before its registered break was over: ${payload.early}`;
  if (kind === 'sitting-began')
    return `Sitting ${payload.sitting} of the session began, more than 24 hours after the trial before.`;
  return null;
}
