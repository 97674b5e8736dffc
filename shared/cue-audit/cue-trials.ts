import type { Method } from '../methods/method.ts';
import { type HeldChoice, revealedDraw } from '../session/counted-trials.ts';
import { kindOf, truthOf } from '../session/fitting.ts';
import type { RequestContent } from '../session/request-leaf.ts';
import { requestsIn } from '../session/requests-told.ts';
import type { RevealedKey } from '../session/revealed-key.ts';
import type { SessionState } from '../session/state.ts';

/** An entry, as far as the audit reads it. */
export type TimedEntry = {
  readonly at: string;
  readonly kind: string;
  readonly payload: { readonly [name: string]: unknown };
};

/** What the clock shows of one presentation, in milliseconds; null or absent where the record does not tell. */
export type PresentationTimes = {
  /** How long each step took since the one before, by its name. */
  readonly steps: ReadonlyMap<string, number>;
  /** From the start of the change to its last step before listening. */
  readonly ready: number | null;
  /** From the start of the change to the start of listening. */
  readonly change: number | null;
  readonly listening: number | null;
};

/** One locked trial with what was drawn, what was answered, and everything else that a listener could have gone by. */
export type CueTrial = {
  readonly session: number;
  readonly trial: number;
  /** From 1, among the session's locked trials. */
  readonly position: number;
  readonly truth: string;
  /** Which of the protocol's cables was drawn for the method's first side in this session. */
  readonly firstSide: 0 | 1;
  readonly answers: readonly { readonly listener: string; readonly choice: string | null }[];
  readonly presentations: readonly PresentationTimes[];
  /** From the end of the trial before to the opening of this one; null for the first. */
  readonly gap: number | null;
  /** From the end of the last presentation to the lock; null where it was paused. */
  readonly answering: number | null;
};

type Clocked = Pick<CueTrial, 'presentations' | 'gap' | 'answering'>;
type OpenPresentation = {
  steps: Map<string, number>;
  started: number;
  last: number;
  listened: number | null;
  ended: number | null;
};

const begun = (at: number): OpenPresentation => ({
  steps: new Map(),
  started: at,
  last: at,
  listened: null,
  ended: null,
});

function timesOf({ steps, started, last, listened, ended }: OpenPresentation): PresentationTimes {
  return {
    steps,
    ready: steps.size === 0 ? null : last - started,
    change: listened === null ? null : listened - started,
    listening: listened === null || ended === null ? null : ended - listened,
  };
}

/** The times of a session's trials, by their numbers: one pass over its entries. */
export function clockedTrials(entries: readonly TimedEntry[]): Map<number, Clocked> {
  const trials = new Map<number, Clocked>();
  let lastEnd: number | null = null;
  let open: {
    opened: number;
    gap: number | null;
    done: OpenPresentation[];
    now: OpenPresentation;
    paused: boolean;
  } | null = null;
  for (const { at: text, kind, payload } of entries) {
    const at = Date.parse(text);
    if (kind === 'trial-opened')
      open = { opened: at, gap: lastEnd === null ? null : at - lastEnd, done: [], now: begun(at), paused: false };
    if (open === null) continue;
    if (kind === 'presentation-requested') open.now = begun(at);
    else if (kind === 'step-confirmed') {
      open.now.steps.set(String(payload.step), at - open.now.last);
      open.now.last = at;
    } else if (kind === 'listening-started') open.now.listened = at;
    else if (kind === 'listening-ended') {
      open.done.push({ ...open.now, ended: at });
      open.now = begun(at);
      open.paused = false;
    } else if (kind === 'resumed') {
      // The presentation starts again from its change; what was measured of it before the pause is no cue of it.
      open.now = begun(at);
      open.paused = true;
    } else if (kind === 'trial-locked' || kind === 'trial-voided') {
      trials.set(Number(payload.trial), {
        presentations: open.done.map(timesOf),
        gap: open.gap,
        answering: open.paused ? null : at - (open.done.at(-1)?.ended ?? at),
      });
      lastEnd = at;
      open = null;
    }
  }
  return trials;
}

const untimed: PresentationTimes = { steps: new Map(), ready: null, change: null, listening: null };

/** On request the first presentation of each label, in the method's order: what was heard again was no longer new. */
function inMethodsOrder(
  { presentations }: Pick<Method, 'presentations'>,
  heard: readonly PresentationTimes[],
  asked: readonly RequestContent[],
): PresentationTimes[] {
  return presentations.map((label) => heard[asked.findIndex((one) => one.label === label)] ?? untimed);
}

/**
 * Every locked main trial of every session with its truth, its answers and its times, in order.
 *
 * @param method  the study's
 * @param states  its sessions, replayed from the record
 * @param entries the record
 * @param key     both secrets, as closing revealed them
 * @param held    the answers that stand beside the record
 * @param requests what was asked for on request, beside it too
 */
export function cueTrials(
  method: Method,
  states: readonly SessionState[],
  entries: readonly TimedEntry[],
  key: RevealedKey,
  held: readonly HeldChoice[],
  requests: readonly RequestContent[] = [],
): CueTrial[] {
  const choices = new Map(held.map(({ session, trial, seat, choice }) => [`${session} ${trial} ${seat}`, choice]));
  return states.flatMap((state) => {
    const ended = state.ended.filter(({ outcome }) => outcome === 'locked');
    const secret = key.draws.find(({ session }) => session === state.session)?.secret;
    if (secret === undefined || ended.length === 0) return [];
    const draw = revealedDraw(state, method, secret, key.codeKey.rows);
    const clocked = clockedTrials(entries.filter(({ payload }) => payload.session === state.session));
    const timesOfTrial = (trial: number): Clocked => {
      const times = clocked.get(trial) ?? { presentations: [], gap: null, answering: null };
      if (state.plan.onRequest === undefined) return times;
      const asked = requestsIn(requests, state.sessionId, trial);
      return { ...times, presentations: inMethodsOrder(method, times.presentations, asked) };
    };
    // Check trials are reported apart; a trial's position is that among all.
    return ended.flatMap(({ trial, seats }, index) =>
      kindOf(draw, state, trial) !== 'main'
        ? []
        : [
            {
              session: state.session,
              trial,
              position: index + 1,
              truth: truthOf(draw, trial),
              firstSide: draw.firstSide,
              answers: seats.map((listener) => ({
                listener,
                choice: choices.get(`${state.sessionId} ${trial} ${listener}`) ?? null,
              })),
              ...timesOfTrial(trial),
            },
          ],
    );
  });
}
