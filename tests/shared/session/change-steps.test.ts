import { describe, expect, it } from 'vitest';
import type { ProctorCommand } from '#shared/contracts/proctor-live.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { leastChangeS, type RigPreset, rigPreset, rigs, stepFault } from '#shared/protocol/rig-preset.ts';
import { plainSteps, shippedPresets } from '#shared/protocol/shipped-presets.ts';
import { stepKindsOf } from '#shared/session/change-steps.ts';
import { decide } from '#shared/session/decide.ts';
import type { SessionPlan } from '#shared/session/events.ts';
import { evolve } from '#shared/session/evolve.ts';
import { listeningMayStartAt } from '#shared/session/progress.ts';
import type { SessionState } from '#shared/session/state.ts';

const kinds = (...names: RigPreset['steps'][number]['kind'][]) => names.map((kind) => ({ kind }));

describe('the steps of a preset', () => {
  it.each(rigs)('ship in a sound order for %s, with waits that a change of 30 s has room for [S20]', (rig) => {
    expect(rigPreset.parse(shippedPresets[rig])).toEqual(shippedPresets[rig]);
    expect(shippedPresets[rig].kind).toBe(rig);
    expect(leastChangeS(shippedPresets[rig].steps)).toBeLessThan(15);
  });

  it.each([
    ['twice the same', kinds('mute', 'unplug', 'unplug', 'fit', 'unmute'), /at most once/],
    ['never unplugged', kinds('mute', 'fit', 'unmute'), /Unplugging/],
    ['nothing fitted', kinds('mute', 'unplug', 'unmute'), /fitting/],
    ['unplugged live', kinds('unplug', 'mute', 'fit', 'unmute'), /Mute comes before/],
    ['fitted before it is out', kinds('mute', 'fit', 'unplug', 'unmute'), /Mute comes before/],
    ['scanned before it is in', kinds('mute', 'unplug', 'scan', 'fit', 'unmute'), /Mute comes before/],
    ['scanned while it plays', kinds('mute', 'unplug', 'fit', 'unmute', 'scan'), /Mute comes before/],
    ['muted for good', kinds('mute', 'unplug', 'fit'), /both, or neither/],
    ['ending with the scan', kinds('unplug', 'fit', 'scan'), /not the last/],
  ])('are refused when %s [S20]', (_, steps, why) => {
    expect(stepFault(steps)).toMatch(why);
  });

  it('may leave out everything but unplugging and fitting, and place checks and waits anywhere [S20]', () => {
    expect(stepFault(kinds('unplug', 'fit'))).toBeNull();
    expect(stepFault(kinds('settle', 'mute', 'unplug', 'fit', 'scan', 'check', 'unmute'))).toBeNull();
  });
});

const abx = methodOf('abx');
const planWith = (preset: RigPreset | undefined, changeMs = 30_000): SessionPlan => ({
  method: 'abx',
  trials: 5,
  spares: 0,
  rig: preset?.kind ?? 'loudspeaker',
  ...(preset === undefined ? {} : { rigPreset: preset }),
  changeMs,
  answerMs: 20_000,
  confidence: false,
  programme: [{ title: 'Piano', start: '', lengthMs: 5_000 }],
});

/** A session at the beginning of a trial's first change, and its clock. */
class Desk {
  now = 0;
  state: SessionState;

  constructor(plan: SessionPlan) {
    const id = '00000000-0000-4000-8000-000000000000';
    const payload = { session: 1, sessionId: id, proctor: id, plan };
    this.state = evolve(null, { kind: 'session-planned', at: 0, payload }, abx);
    this.do({ kind: 'confirm-cautions', items: ['amplifier', 'shorts', 'mains', 'hearing', 'local-rules'] });
    this.do({ kind: 'open-seating', commitment: '0'.repeat(64) });
    const seat = { seat: 'L01', commitment: '0'.repeat(64), consentVersion: 1, joinedBy: 'code' as const };
    this.do({ kind: 'take-seat', ...seat });
    this.do({ kind: 'close-seating' });
    this.now += 30_000;
    this.do({ kind: 'tick' });
    this.do({ kind: 'begin-familiarisation' });
  }

  do(command: Parameters<typeof decide>[1]): void {
    for (const event of decide(this.state, command, this.now)) this.state = evolve(this.state, event, abx);
  }

  confirm(step: Extract<ProctorCommand, { kind: 'confirm-step' }>['step']): void {
    this.do({ kind: 'confirm-step', step });
  }

  get trial() {
    if (this.state.trial === null) throw new Error('no trial is open');
    return this.state.trial;
  }
}

describe('a change', () => {
  it('goes through the five plain steps where the plan names no preset [S22]', () => {
    expect(stepKindsOf(planWith(undefined))).toEqual(['mute', 'unplug', 'fit', 'check', 'unmute']);
    expect(plainSteps('headphone').every(({ leastS }) => leastS === 0)).toBe(true);
  });

  it('does not leave a step before its least wait, nor one out of turn [S22]', () => {
    const desk = new Desk(planWith(shippedPresets.line));
    expect(() => desk.confirm('mute')).toThrow('least time');
    desk.now += 2_999;
    expect(() => desk.confirm('mute')).toThrow('least time');
    desk.now += 1;
    expect(() => desk.confirm('unplug')).toThrow('done already');
    desk.confirm('mute');
    desk.confirm('unplug');
    expect(desk.trial.stepsDone).toEqual(['mute', 'unplug']);
  });

  it('starts listening with its last step, whichever that is, at the registered time [S5] [S22]', () => {
    const steps = shippedPresets.loudspeaker.steps.filter(({ kind }) => kind !== 'scan');
    const desk = new Desk(planWith({ ...shippedPresets.loudspeaker, steps }));
    const began = desk.now;
    for (const step of ['mute', 'unplug', 'fit', 'check', 'unmute'] as const) desk.confirm(step);
    desk.now = began + 29_999;
    expect(() => desk.confirm('settle')).toThrow('registered time');
    desk.now = began + 30_000;
    desk.confirm('settle');
    expect(desk.trial).toMatchObject({ stage: 'listening', longChanges: 0 });
  });

  it('waits for the next whole length when the last wait cannot end in time, and says so at once [S5] [S22]', () => {
    const steps = shippedPresets.loudspeaker.steps.filter(({ kind }) => kind !== 'scan');
    const desk = new Desk(planWith({ ...shippedPresets.loudspeaker, steps }));
    const began = desk.now;
    for (const step of ['mute', 'unplug', 'fit', 'check'] as const) desk.confirm(step);
    desk.now = began + 22_000;
    expect(listeningMayStartAt(desk.trial, desk.state.plan, desk.now)).toBe(began + 30_000);
    desk.now = began + 22_001;
    expect(listeningMayStartAt(desk.trial, desk.state.plan, desk.now)).toBe(began + 60_000);
    desk.confirm('unmute');
    desk.now = began + 60_000;
    desk.confirm('settle');
    expect(desk.trial).toMatchObject({ stage: 'listening', longChanges: 1 });
  });
});

describe('the cautions', () => {
  it('are those of the preset: no more are asked for, none fewer are enough [S24]', () => {
    const preset: RigPreset = { ...shippedPresets.headphone, cautions: ['hearing', 'amplifier'] };
    const id = '00000000-0000-4000-8000-000000000000';
    const payload = { session: 1, sessionId: id, proctor: id, plan: planWith(preset) };
    const state = evolve(null, { kind: 'session-planned', at: 0, payload }, abx);
    expect(() => decide(state, { kind: 'confirm-cautions', items: ['hearing'] }, 0)).toThrow('every caution');
    expect(decide(state, { kind: 'confirm-cautions', items: ['hearing', 'amplifier'] }, 0)).toMatchObject([
      { kind: 'cautions-confirmed', payload: { items: ['amplifier', 'hearing'] } },
    ]);
  });
});
