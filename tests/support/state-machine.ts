import { type Caution, cautions } from '#shared/contracts/proctor-live.ts';
import { methodOf } from '#shared/methods/methods.ts';
import type { RigPreset } from '#shared/protocol/rig-preset.ts';
import { decide, type SessionCommand } from '#shared/session/decide.ts';
import type { SessionEvent, SessionPlan } from '#shared/session/events.ts';
import { evolve, holdAnswer } from '#shared/session/evolve.ts';
import type { SessionState } from '#shared/session/state.ts';

// A session by the state machine alone: no server, a clock by hand.

const id = '00000000-0000-4000-8000-000000000000';
const hex = '0'.repeat(64);

export const planWith = (preset: RigPreset | undefined, changeMs = 30_000): SessionPlan => ({
  method: 'abx',
  trials: 5,
  spares: 1,
  rig: preset?.kind ?? 'loudspeaker',
  ...(preset === undefined ? {} : { rigPreset: preset }),
  changeMs,
  answerMs: 20_000,
  confidence: false,
  programme: [{ title: 'Piano', start: '', lengthMs: 5_000 }],
});

export class MachineSession {
  readonly method;
  readonly events: SessionEvent[] = [];
  now = 0;
  state: SessionState;

  constructor(plan: SessionPlan) {
    this.method = methodOf(plan.method);
    const planned: SessionEvent = {
      kind: 'session-planned',
      at: 0,
      payload: { session: 1, sessionId: id, proctor: id, plan },
    };
    this.events.push(planned);
    this.state = evolve(null, planned, this.method);
  }

  do(command: SessionCommand): SessionEvent[] {
    const events = decide(this.state, command, this.now);
    for (const event of events) this.state = evolve(this.state, event, this.method);
    this.events.push(...events);
    return events;
  }

  hold(seat: string): void {
    this.state = holdAnswer(this.state, seat, hex);
  }

  /** Up to the fixed draw, with phones that reveal nothing. */
  seat(labels: readonly string[], ticked: readonly Caution[] = cautions): void {
    this.do({ kind: 'confirm-cautions', items: [...ticked] });
    this.do({ kind: 'open-seating', commitment: hex });
    for (const seat of labels)
      this.do({ kind: 'take-seat', seat, commitment: hex, consentVersion: 1, joinedBy: 'code' });
    this.do({ kind: 'close-seating' });
    this.now += 30_000;
    this.do({ kind: 'tick' });
  }

  get trial() {
    if (this.state.trial === null) throw new Error('no trial is open');
    return this.state.trial;
  }
}
