import type { Entry } from '../ledger/chain.ts';
import type { Method } from '../methods/method.ts';
import { witnessOf } from './observers.ts';
import type { SessionState } from './state.ts';
import { studyEvents } from './study-events.ts';

export type BlindingRung = {
  readonly name: 'open' | 'listener-blind' | 'double-blind to the cable' | 'fully double-blind';
  readonly why: string;
  /** Whether every session was witnessed; left out below *double-blind*, where no witness could raise it. */
  readonly isWitnessed?: boolean;
};

/** Why listeners could have known what they heard, or null: what had to stay sealed was sealed before and opened after. */
function whyOpen(entries: readonly Entry[]): string | null {
  const first = (kind: string) => entries.find((entry) => entry.kind === kind)?.sequence ?? Number.POSITIVE_INFINITY;
  const opened = first('trial-opened');
  const lastTrial = entries.findLast(({ kind }) => kind === 'trial-opened' || kind === 'trial-locked')?.sequence ?? 0;
  if (opened === Number.POSITIVE_INFINITY) return null;
  if (first('protocol-sealed') > opened) return 'The protocol was not sealed before the first trial.';
  const last = (kind: string) => entries.findLast((entry) => entry.kind === kind)?.sequence ?? 0;
  if (last('protocol-amended') > opened) return 'The protocol was amended after the first trial.';
  if (Math.max(first('code-key-committed'), last('code-key-committed')) > opened)
    return 'The code key was not committed to before the first trial.';
  if (first('key-revealed') < lastTrial) return 'The secrets were revealed before the last trial had locked.';
  const fixed = new Set<unknown>();
  for (const { kind, payload } of entries) {
    if (kind === 'draw-fixed') fixed.add(payload.session);
    if (kind === 'trial-opened' && !fixed.has(payload.session))
      return `Session ${payload.session} had a trial before its draw was fixed.`;
  }
  return null;
}

/** Whoever drew, opened or confirmed the codes in use, beside the person named as their holder. A void key tells nothing. */
function keyHoldersOf(entries: readonly Entry[], codeHolder: string): Set<string> {
  const acts = ['code-key-committed', 'code-key-opened', 'code-key-confirmed'];
  const since = entries.findLast(({ kind }) => kind === 'code-key-voided')?.sequence ?? 0;
  const inUse = entries.filter(({ kind, sequence }) => acts.includes(kind) && sequence > since);
  return new Set([codeHolder, ...inUse.map(({ payload }) => String(payload.by))]);
}

/**
 * How blind a closed study was, derived from its record and never ticked in a box.
 *
 * *Open* when the record itself shows that something was not sealed in time: nothing of it may be published. A doubled
 * duty, or a proctor who could see the code key or the cables' pages, caps it at *listener-blind*. A cable that is fitted
 * under one code all through a session reaches *double-blind to the cable* at most: whoever fits it learns something from
 * the codes, and the method says what. Separate specimens in every session reach *fully double-blind*; the method says
 * what is left even then.
 *
 * @throws RangeError when the record has no closing
 */
export function blindingRung(
  entries: readonly Entry[],
  sessions: readonly SessionState[],
  method: Pick<Method, 'fitterCouldSee' | 'separate' | 'onRequest'>,
): BlindingRung {
  const closing = entries.find((entry) => entry.kind === 'study-closed');
  if (closing === undefined) throw new RangeError('the blinding rung is derived once the study is closed');
  const open = whyOpen(entries);
  if (open !== null) return { name: 'open', why: open };
  const { manager, owners, managers, codeHolder } = studyEvents['study-closed'].parse(closing.payload);
  const proctors = new Set(sessions.filter((session) => session.seats.length > 0).map((session) => session.proctor));
  const keyHolders = keyHoldersOf(entries, codeHolder);
  const sawCables = [...owners, ...managers, manager].some((person) => proctors.has(person));
  if ([...keyHolders].some((person) => proctors.has(person)))
    return { name: 'listener-blind', why: 'The code holder also ran a session.' };
  const measured = entries.filter(({ kind }) => kind === 'levels-measured').map(({ payload }) => String(payload.by));
  if (measured.some((person) => proctors.has(person)))
    return { name: 'listener-blind', why: 'A proctor measured the levels and saw them by code.' };
  if (sawCables) return { name: 'listener-blind', why: 'A proctor could see the cables’ pages.' };
  if ([...keyHolders].some((person) => person === manager || owners.includes(person)))
    return { name: 'listener-blind', why: 'The code holder also managed the study or owns the organisation.' };
  const witness = witnessOf(sessions);
  const never = 'The proctor never saw code key or cable pages.';
  const asked = sessions.some(({ plan }) => plan.onRequest !== undefined) ? method.onRequest : null;
  const seated = sessions.filter((session) => session.seats.length > 0);
  if (method.separate !== null && seated.length > 0 && seated.every(({ plan }) => plan.separateSpecimens === true))
    return {
      name: 'fully double-blind',
      isWitnessed: witness.isWitnessed,
      why: [never, method.separate.stillSeen, ...(asked === null ? [] : [asked.stillSeen]), witness.words].join(' '),
    };
  const could = asked?.fitterCouldSee ?? method.fitterCouldSee;
  return {
    name: 'double-blind to the cable',
    isWitnessed: witness.isWitnessed,
    why: `${never} ${could} ${witness.words}`,
  };
}
