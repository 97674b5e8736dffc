import { createHash } from 'node:crypto';
import { cautions } from '#shared/contracts/proctor-live.ts';
import { runCueAudit } from '#shared/cue-audit/run-cue-audit.ts';
import { canonicalJson, type Json } from '#shared/ledger/canonical-json.ts';
import { type Entry, nextEntry } from '#shared/ledger/chain.ts';
import type { ClosedStudy } from '#shared/ledger/publication-parts.ts';
import type { Method } from '#shared/methods/method.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { runChecks } from '#shared/methods/run-checks.ts';
import { runRegistered } from '#shared/methods/run-registered.ts';
import { codedCables, type Protocol, protocolDigest, sessionPlanOf } from '#shared/protocol/protocol.ts';
import { checkExclusion } from '#shared/protocol/registered-analysis.ts';
import { chosenWays, type WaysToRun } from '#shared/protocol/ways-to-run.ts';
import { type AnswerContent, answerLeaf, contributionCommitment } from '#shared/session/answer-leaf.ts';
import { isLastStep, nextStep } from '#shared/session/change-steps.ts';
import { codeKeyCommitment, drawSecretCommitment } from '#shared/session/commitments.ts';
import { decide, type SessionCommand } from '#shared/session/decide.ts';
import { evolve, holdAnswer } from '#shared/session/evolve.ts';
import { holdRequest, waitsForListeners } from '#shared/session/on-request.ts';
import { sessionsInRecord } from '#shared/session/read-record.ts';
import { type RequestContent, requestLeaf } from '#shared/session/request-leaf.ts';
import type { RevealedKey } from '#shared/session/revealed-key.ts';
import type { SessionState } from '#shared/session/state.ts';

// A closed study made by the state machine alone: two sessions, the second abandoned, with a void and a missing answer.

const hex = (text: string, bytes: number) =>
  createHash('sha256')
    .update(text)
    .digest('hex')
    .slice(0, bytes * 2);
const id = (text: string) => {
  const h = hex(text, 16);
  return `${h.slice(0, 8)}-${h.slice(8, 12)}-4${h.slice(13, 16)}-8${h.slice(17, 20)}-${h.slice(20)}`;
};
export const people = { manager: id('manager'), holder: id('holder'), proctor: id('proctor'), owner: id('owner') };

/** Entries chained again from the first, so that only what they say has changed. */
export function chainedAgain(entries: readonly Entry[]): Entry[] {
  const chained: Entry[] = [];
  for (const { study, at, kind, version, payload, nonce } of entries)
    chained.push(nextEntry(chained.at(-1) ?? null, { study, at, kind, version, payload, nonce }));
  return chained;
}

export class StudyMaker {
  readonly study = id('study');
  readonly entries: Entry[] = [];
  readonly answers: AnswerContent[] = [];
  readonly requests: RequestContent[] = [];
  now = Date.parse('2026-12-05T18:00:00.000Z');

  put(kind: string, payload: object): void {
    const nonce = hex(`nonce ${this.entries.length}`, 16);
    const at = new Date(this.now).toISOString();
    const content = { study: this.study, at, kind, version: 1, payload: payload as Entry['payload'], nonce };
    this.entries.push(nextEntry(this.entries.at(-1) ?? null, content));
  }
}

const cable = (name: string) => ({
  id: id(name),
  name,
  kind: 'loudspeaker' as const,
  lengthMm: 3000,
  description: '',
  specimens: [1, 2].map((n) => ({ id: id(`${name} ${n}`), serial: `${name[0]}-${n}`, note: '' })),
});

type Size = { readonly sessions: number; readonly trials: number; readonly spares: number };

export const protocolFor = (
  study: string,
  listeners: number,
  method: string,
  size: Size = { sessions: 2, trials: 5, spares: 2 },
): Protocol => ({
  format: 'fairlead-protocol',
  version: 1,
  study,
  salt: hex('salt', 32),
  title: 'Study Plover',
  question: 'Can these listeners tell the two cables apart?',
  method,
  cables: [cable('Northern run'), cable('Southern run')],
  design: {
    ...size,
    listenersPerSession: listeners,
    confidence: false,
    codeHolder: people.holder,
  },
  conduct: {
    rig: 'loudspeaker',
    chain: 'Player, amplifier, loudspeakers',
    changeS: 30,
    answerS: 20,
    programme: [{ title: 'Piano', start: '0:10', lengthS: 12 }],
  },
  analysis: {
    ...methodOf(method).registered({}),
    alpha: '0.05',
    stopping: 'fixed number of trials',
    exclusions: 'none',
  },
});

export class SessionMaker {
  readonly #maker: StudyMaker;
  readonly #method: Method;
  #state: SessionState;

  constructor(maker: StudyMaker, protocol: Protocol, session: number) {
    this.#maker = maker;
    this.#method = methodOf(protocol.method);
    const payload = {
      session,
      sessionId: id(`session ${session}`),
      proctor: people.proctor,
      plan: sessionPlanOf(protocol),
    };
    maker.put('session-planned', payload);
    this.#state = evolve(null, { kind: 'session-planned', at: maker.now, payload }, this.#method);
  }

  do(command: SessionCommand): void {
    for (const event of decide(this.#state, command, this.#maker.now)) {
      this.#maker.put(event.kind, event.payload);
      this.#state = evolve(this.#state, event, this.#method);
    }
  }

  seat(labels: readonly string[], commitment: string): void {
    this.do({ kind: 'confirm-cautions', items: [...cautions] });
    this.do({ kind: 'open-seating', commitment });
    const value = (seat: string) => hex(`contribution ${seat}`, 32);
    for (const seat of labels)
      this.do({
        kind: 'take-seat',
        seat,
        commitment: contributionCommitment(value(seat)),
        consentVersion: 1,
        joinedBy: 'personal-link',
      });
    this.do({ kind: 'close-seating' });
    for (const seat of labels) this.do({ kind: 'reveal', seat, value: value(seat) });
  }

  present(): void {
    for (;;) {
      const { trial } = this.#state;
      if (trial === null || waitsForListeners(trial)) return;
      const step = nextStep(trial, this.#state.plan);
      if (isLastStep(trial, this.#state.plan)) this.#maker.now = trial.changeStartedAt + this.#state.plan.changeMs;
      if (step !== null) this.do({ kind: 'confirm-step', step });
      else {
        this.#maker.now = trial.endsAt ?? this.#maker.now;
        this.do({ kind: 'tick' });
      }
    }
  }

  /** On request: asks for each in turn and hears it. */
  ask(seat: string, labels: readonly string[]): void {
    for (const label of labels) {
      const { trial, sessionId: session } = this.#state;
      const [number, presentation] = [trial?.trial ?? 0, trial?.requests.length ?? 0];
      const salt = hex(`request ${session} ${number} ${presentation}`, 16);
      const content = { session, seat, trial: number, presentation, label, salt };
      this.#maker.requests.push(content);
      this.do({ kind: 'request-presentation', seat, trial: number, presentation, label, leaf: requestLeaf(content) });
      this.#state = holdRequest(this.#state, presentation, label);
      this.present();
    }
  }

  answer(seat: string, choice: string): void {
    const { trial, sessionId: session } = this.#state;
    const number = trial?.trial ?? 0;
    const salt = hex(`salt ${session} ${seat} ${number}`, 16);
    const content = { session, seat, trial: number, choice, confidence: null, salt };
    this.#maker.answers.push(content);
    this.#state = holdAnswer(this.#state, seat, answerLeaf(content));
  }

  lock(): void {
    this.#maker.now = this.#state.trial?.endsAt ?? this.#maker.now;
    this.do({ kind: 'tick' });
  }
}

function runSession(maker: StudyMaker, protocol: Protocol, session: number, listeners: number): void {
  const made = new SessionMaker(maker, protocol, session);
  const seats = Array.from({ length: listeners }, (_, index) => `L0${(session - 1) * listeners + index + 1}`);
  made.seat(seats, sealedSecret(session));
  made.do({ kind: 'begin-familiarisation' });
  made.present();
  const choices = methodOf(protocol.method)
    .options({})
    .map(({ value }) => value);
  const last = session === 1 ? sessionPlanOf(protocol).trials + 1 : 3;
  for (let trial = 1; trial <= last; trial += 1) {
    made.do({ kind: 'begin-trial' });
    if (protocol.design.onRequest !== undefined)
      made.ask(seats[0] ?? '', ['X', 'A', 'B', 'X'].slice(0, 3 + (trial % 2)));
    made.present();
    const isSilent = (index: number) => session === 1 && trial === 4 && index === 0;
    for (const [index, seat] of seats.entries())
      if (!isSilent(index)) made.answer(seat, choices[(trial + index) % 3 ? 0 : 1] ?? '');
    if (session === 1 && trial === 2) made.do({ kind: 'void-trial', reason: 'noise', note: 'A door.' });
    else made.lock();
  }
  if (session === 1) made.do({ kind: 'finish' });
  else made.do({ kind: 'abandon', reason: 'The amplifier failed.' });
}

/** What is sealed before anybody sits down: the protocol, perhaps amended once, and which code is which specimen. */
export function seal(maker: StudyMaker, protocol: Protocol, earlier: Protocol | null): RevealedKey['codeKey'] {
  const rows = codedCables(protocol).flatMap(({ specimens }, index) =>
    specimens.map(({ id: specimen, serial }, n) => ({
      code: String(317 + index * 211 + n * 38),
      specimen,
      serial,
      cable: index,
    })),
  );
  const codeKey = { salt: hex('key salt', 32), rows };
  const digest = protocolDigest(earlier ?? protocol);
  maker.put('protocol-sealed', { protocolVersion: 1, digest, sealedBy: people.manager });
  if (earlier !== null)
    maker.put('protocol-amended', {
      protocolVersion: 2,
      digest: protocolDigest(protocol),
      amendedBy: people.manager,
      reason: 'The amplifier was sold.',
    });
  maker.put('code-key-committed', {
    commitment: codeKeyCommitment(codeKey.salt, rows),
    specimens: rows.length,
    by: people.holder,
  });
  return codeKey;
}

/** The end: secrets revealed and the registered analysis run. */
export function close(
  maker: StudyMaker,
  protocol: Protocol,
  codeKey: RevealedKey['codeKey'],
  ending: { readonly complete: boolean; readonly reason: string },
  earlier: Protocol | null,
): ClosedStudy {
  maker.put('study-closed', {
    by: people.manager,
    ...ending,
    manager: people.manager,
    owners: [people.owner],
    managers: [people.manager],
    codeHolder: people.holder,
  });
  const draws = Array.from({ length: protocol.design.sessions }, (_, index) => ({
    session: index + 1,
    secret: hex(`secret ${index + 1}`, 32),
    salt: hex(`draw salt ${index + 1}`, 32),
  }));
  const key = { codeKey, draws };
  maker.put('key-revealed', key);
  const method = methodOf(protocol.method);
  const states = sessionsInRecord(maker.entries, method);
  const result = runRegistered(protocol, states, key, maker.answers);
  const cues = runCueAudit(protocol, states, maker.entries, key, maker.answers, maker.requests);
  const checks = runChecks(protocol, states, key, maker.answers);
  maker.put('result-recorded', {
    analysis: protocol.analysis.name,
    result,
    ...(checks === undefined ? {} : { checks }),
    cues,
  });
  return JSON.parse(
    canonicalJson({
      entries: maker.entries,
      protocol,
      ...(earlier === null ? {} : { earlierProtocols: [earlier] }),
      answers: maker.answers,
      ...(maker.requests.length === 0 ? {} : { requests: maker.requests }),
    } as unknown as Json),
  ) as ClosedStudy;
}

export const sealedSecret = (session: number) =>
  drawSecretCommitment(hex(`draw salt ${session}`, 32), hex(`secret ${session}`, 32));

function withLadder(protocol: Protocol, ladder: readonly { milliDb: number; trials: number }[]): Protocol {
  if (ladder.length === 0) return protocol;
  const checkCable = (milliDb: number) => ({ ...cable(`Check of ${milliDb}`), kind: 'check' as const });
  const steps = ladder.map((step) => ({ ...step, cable: checkCable(step.milliDb) }));
  return {
    ...protocol,
    checks: { reference: 0, steps, same: 1 },
    analysis: { ...protocol.analysis, exclusions: checkExclusion },
  };
}

/**
 * @param listeners seats per session, 1 to 4
 * @param startsAt  when it is sealed, in milliseconds since 1970
 * @param isAmended whether the protocol is sealed with another chain first, and amended before the codes are drawn
 * @param ways      how its sessions are run beside the usual way
 * @param ladder    its check trials, largest first; with any, one of the same with the same, and a second result
 */
export function closedStudy(
  listeners: number,
  methodId = 'abx',
  startsAt?: number,
  isAmended = false,
  ways: WaysToRun = {},
  ladder: readonly { milliDb: number; trials: number }[] = [],
): ClosedStudy {
  const maker = new StudyMaker();
  if (startsAt !== undefined) maker.now = startsAt;
  const plain = protocolFor(maker.study, listeners, methodId);
  const first = { ...withLadder(plain, ladder), design: { ...plain.design, ...chosenWays(ways) } };
  const conduct = { ...first.conduct, chain: 'Player, another amplifier, loudspeakers' };
  const protocol = isAmended ? { ...first, version: 2, salt: hex('second salt', 32), conduct } : first;
  const earlier = isAmended ? first : null;
  const codeKey = seal(maker, protocol, earlier);
  for (const session of [1, 2]) runSession(maker, protocol, session, listeners);
  return close(maker, protocol, codeKey, { complete: false, reason: 'The amplifier failed.' }, earlier);
}
