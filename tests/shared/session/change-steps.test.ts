import { describe, expect, it } from 'vitest';
import type { ChangeStep } from '#shared/contracts/proctor-live.ts';
import { leastChangeS, type RigPreset, rigPreset, rigs, stepFault } from '#shared/protocol/rig-preset.ts';
import { plainSteps, shippedPresets } from '#shared/protocol/shipped-presets.ts';
import { stepKindsOf } from '#shared/session/change-steps.ts';
import type { SessionPlan } from '#shared/session/events.ts';
import { listeningMayStartAt } from '#shared/session/progress.ts';
import { MachineSession, planWith } from '../../support/state-machine.ts';

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

/** A session at the beginning of its first change. */
function atChange(plan: SessionPlan) {
  const desk = new MachineSession(plan);
  desk.seat(['L01']);
  desk.do({ kind: 'begin-familiarisation' });
  return desk;
}
const confirm = (desk: MachineSession, ...steps: ChangeStep[]) => {
  for (const step of steps) desk.do({ kind: 'confirm-step', step });
};

describe('a change', () => {
  it('goes through the five plain steps where the plan names no preset [S22]', () => {
    expect(stepKindsOf(planWith(undefined))).toEqual(['mute', 'unplug', 'fit', 'check', 'unmute']);
    expect(plainSteps('headphone').every(({ leastS }) => leastS === 0)).toBe(true);
  });

  it('does not leave a step before its least wait, nor one out of turn [S22]', () => {
    const desk = atChange(planWith(shippedPresets.line));
    expect(() => confirm(desk, 'mute')).toThrow('least time');
    desk.now += 2_999;
    expect(() => confirm(desk, 'mute')).toThrow('least time');
    desk.now += 1;
    expect(() => confirm(desk, 'unplug')).toThrow('done already');
    confirm(desk, 'mute');
    confirm(desk, 'unplug');
    expect(desk.trial.stepsDone).toEqual(['mute', 'unplug']);
  });

  it('starts listening with its last step, whichever that is, at the registered time [S5] [S22]', () => {
    const steps = shippedPresets.loudspeaker.steps.filter(({ kind }) => kind !== 'scan');
    const desk = atChange(planWith({ ...shippedPresets.loudspeaker, steps }));
    const began = desk.now;
    confirm(desk, 'mute', 'unplug', 'fit', 'check', 'unmute');
    desk.now = began + 29_999;
    expect(() => confirm(desk, 'settle')).toThrow('registered time');
    desk.now = began + 30_000;
    confirm(desk, 'settle');
    expect(desk.trial).toMatchObject({ stage: 'listening', longChanges: 0 });
  });

  it('waits for the next whole length when the last wait cannot end in time, and says so at once [S5] [S22]', () => {
    const steps = shippedPresets.loudspeaker.steps.filter(({ kind }) => kind !== 'scan');
    const desk = atChange(planWith({ ...shippedPresets.loudspeaker, steps }));
    const began = desk.now;
    confirm(desk, 'mute', 'unplug', 'fit', 'check');
    desk.now = began + 22_000;
    expect(listeningMayStartAt(desk.trial, desk.state.plan, desk.now)).toBe(began + 30_000);
    desk.now = began + 22_001;
    expect(listeningMayStartAt(desk.trial, desk.state.plan, desk.now)).toBe(began + 60_000);
    confirm(desk, 'unmute');
    desk.now = began + 60_000;
    confirm(desk, 'settle');
    expect(desk.trial).toMatchObject({ stage: 'listening', longChanges: 1 });
  });
});

describe('the cautions', () => {
  it('are those of the preset: no more are asked for, none fewer are enough [S24]', () => {
    const preset: RigPreset = { ...shippedPresets.headphone, cautions: ['hearing', 'amplifier'] };
    const desk = new MachineSession(planWith(preset));
    expect(() => desk.do({ kind: 'confirm-cautions', items: ['hearing'] })).toThrow('every caution');
    expect(desk.do({ kind: 'confirm-cautions', items: ['hearing', 'amplifier'] })).toMatchObject([
      { kind: 'cautions-confirmed', payload: { items: ['amplifier', 'hearing'] } },
    ]);
  });
});
