import { describe, expect, it } from 'vitest';
import { shippedPresets } from '#shared/protocol/shipped-presets.ts';
import { isUsableCode } from '#shared/session/blind-codes.ts';
import { isFromScanner, labelText, readLabel, studyMark } from '#shared/session/label-text.ts';
import { MachineSession, planWith } from '../../support/state-machine.ts';

const study = '7d9f1c7e-2f5e-4a5b-9c39-0d9d7a4a51c2';

describe('the text of a label', () => {
  it('holds the code, the study’s mark and the end, and reads back whole [S25]', () => {
    const mark = studyMark(study);
    expect(mark).toMatch(/^[BCDEFGHJKLNPRSTUVX]{4}$/);
    for (const end of [1, 2] as const)
      expect(readLabel(` ${labelText(mark, '417', end).toLowerCase()}\n`)).toEqual({ mark, code: '417', end });
  });

  it('differs between studies, and between the codes of a study in nothing but the code [S25]', () => {
    const others = Array.from({ length: 200 }, (_, n) => studyMark(`${study}${n}`));
    expect(new Set(others).size).toBeGreaterThan(195);
    expect(labelText(studyMark(study), '417', 1).replace('417', '')).toBe(
      labelText(studyMark(study), '582', 1).replace('582', ''),
    );
  });

  it('is read as well when it is typed, and as the first labels had it [S26]', () => {
    expect(readLabel('417')).toEqual({ mark: null, code: '417', end: null });
    expect(readLabel('FL:417')).toEqual({ mark: null, code: '417', end: null });
    expect(['', '41', '4177', '017', 'FLBDFK4173', 'hello'].map(readLabel)).toEqual([
      null,
      null,
      null,
      null,
      null,
      null,
    ]);
    expect([isFromScanner('flbdfk4171'), isFromScanner('417')]).toEqual([true, false]);
  });

  it('takes every code that can be drawn [S25]', () => {
    const codes = Array.from({ length: 1000 }, (_, n) => String(n).padStart(3, '0')).filter((c) => isUsableCode(c, []));
    expect(codes.filter((code) => readLabel(labelText('BDFK', code, 2))?.code !== code)).toEqual([]);
  });
});

/** At the step for scanning, of the first presentation of the familiarisation. */
function atScan() {
  const desk = new MachineSession(planWith(shippedPresets.loudspeaker));
  desk.seat(['L01']);
  desk.do({ kind: 'begin-familiarisation' });
  for (const step of ['mute', 'unplug', 'fit'] as const) desk.do({ kind: 'confirm-step', step });
  return desk;
}
const scan = (end: 1 | 2 | null, verdict: 'wanted' | 'other-code' | 'other-study' = 'wanted') =>
  ({ kind: 'note-scan', code: '417', end, by: 'scanner', verdict }) as const;

describe('the scan', () => {
  it('wants both ends, in any order, and then the step is over [S26]', () => {
    const desk = atScan();
    expect(() => desk.do({ kind: 'confirm-step', step: 'scan' })).toThrow('both ends');
    desk.do(scan(2));
    expect(() => desk.do(scan(2))).toThrow('other end');
    expect(desk.do(scan(1)).map(({ kind }) => kind)).toEqual(['label-scanned', 'step-confirmed']);
    expect(desk.state.scans).toEqual({ made: 2, byHand: 0, wrong: 0, undone: 0 });
  });

  it('keeps no code that fits on the record, and a wrong one with its code [S27]', () => {
    const desk = atScan();
    const [wrong] = desk.do(scan(1, 'other-code'));
    expect(wrong?.payload).toMatchObject({ code: '417', why: 'other-code', by: 'scanner' });
    desk.do(scan(1));
    desk.do(scan(2));
    const right = desk.events.filter(({ kind }) => kind === 'label-scanned' || kind === 'step-confirmed');
    expect(JSON.stringify(right)).not.toContain('417');
    expect(JSON.stringify(desk.state)).not.toContain('417');
    expect(desk.state.scans.wrong).toBe(1);
  });

  it('begins anew after a wrong label: the cable at the other end may be another one too [S27]', () => {
    const desk = atScan();
    desk.do(scan(1));
    desk.do(scan(2, 'other-code'));
    expect(desk.trial.scannedEnds).toEqual([]);
  });

  it('can be confirmed by hand with a word why [S28]', () => {
    const desk = atScan();
    desk.do(scan(1));
    const [byHand] = desk.do({ kind: 'confirm-by-hand', reason: 'label torn' });
    expect(byHand).toMatchObject({ kind: 'scan-by-hand', payload: { reason: 'label torn', ends: 1 } });
    expect(desk.trial.stepsDone.at(-1)).toBe('scan');
    expect(desk.state.scans.byHand).toBe(1);
  });

  it('is refused at any other step [S26]', () => {
    const desk = atScan();
    desk.do({ kind: 'undo-step' });
    expect(() => desk.do(scan(1))).toThrow('Nothing is to be scanned now');
    expect(() => desk.do({ kind: 'confirm-by-hand', reason: 'why not' })).toThrow('Nothing is to be scanned now');
  });
});

describe('taking a step back', () => {
  it('is an entry of its own, and the step is to be done again [S31]', () => {
    const desk = atScan();
    desk.do(scan(1));
    desk.do(scan(2));
    const [undone] = desk.do({ kind: 'undo-step' });
    expect(undone).toMatchObject({ kind: 'step-undone', payload: { step: 'scan' } });
    expect(desk.trial).toMatchObject({ stepsDone: ['mute', 'unplug', 'fit'], scannedEnds: [] });
    expect(desk.events.filter(({ kind }) => kind === 'label-scanned')).toHaveLength(2);
  });

  it('takes the least wait of the step from the beginning [S31]', () => {
    const desk = new MachineSession(planWith(shippedPresets.line));
    desk.seat(['L01']);
    desk.do({ kind: 'begin-familiarisation' });
    desk.now += 3_000;
    desk.do({ kind: 'confirm-step', step: 'mute' });
    desk.do({ kind: 'undo-step' });
    expect(() => desk.do({ kind: 'confirm-step', step: 'mute' })).toThrow('least time');
  });

  it('takes a presentation that is heard back to the beginning of its change [S31]', () => {
    const desk = atScan();
    desk.do(scan(1));
    desk.do(scan(2));
    desk.do({ kind: 'confirm-step', step: 'check' });
    desk.do({ kind: 'confirm-step', step: 'unmute' });
    desk.now = desk.trial.changeStartedAt + 30_000;
    desk.do({ kind: 'confirm-step', step: 'settle' });
    desk.now += 1_000;
    desk.do({ kind: 'undo-step' });
    expect(desk.trial).toMatchObject({ stage: 'change', presentation: 0, stepsDone: [], changeStartedAt: desk.now });
    expect(desk.state.scans.undone).toBe(1);
  });

  it('is refused where there is nothing to take back, and once they answer [S31]', () => {
    const desk = new MachineSession(planWith(undefined));
    desk.seat(['L01']);
    desk.do({ kind: 'begin-familiarisation' });
    expect(() => desk.do({ kind: 'undo-step' })).toThrow('only begun');
    const present = () => {
      for (const step of ['mute', 'unplug', 'fit', 'check'] as const) desk.do({ kind: 'confirm-step', step });
      desk.now = desk.trial.changeStartedAt + 30_000;
      desk.do({ kind: 'confirm-step', step: 'unmute' });
      desk.now += 5_000;
      desk.do({ kind: 'tick' });
    };
    present();
    present();
    desk.do({ kind: 'begin-trial' });
    for (let n = 0; n < 3; n += 1) present();
    expect(desk.trial.stage).toBe('answering');
    expect(() => desk.do({ kind: 'undo-step' })).toThrow('void');
  });
});

describe('the inventory', () => {
  function atEnd() {
    const desk = new MachineSession({ ...planWith(shippedPresets.loudspeaker), trials: 5, spares: 0 });
    desk.seat(['L01']);
    desk.do({ kind: 'begin-familiarisation' });
    for (let presentation = 0; presentation < 2; presentation += 1) {
      for (const step of ['mute', 'unplug', 'fit'] as const) desk.do({ kind: 'confirm-step', step });
      desk.do({ kind: 'confirm-by-hand', reason: 'no scanner' });
      for (const step of ['check', 'unmute'] as const) desk.do({ kind: 'confirm-step', step });
      desk.now = desk.trial.changeStartedAt + 30_000;
      desk.do({ kind: 'confirm-step', step: 'settle' });
      desk.now += 5_000;
      desk.do({ kind: 'tick' });
    }
    for (let trial = 0; trial < 5; trial += 1) {
      desk.do({ kind: 'begin-trial' });
      desk.do({ kind: 'void-trial', reason: 'noise', note: '' });
    }
    return desk;
  }
  const sleeve = (code: string, isOurs = true) => ({ kind: 'note-inventory-scan', code, by: 'typed', isOurs }) as const;
  const codes = ['417', '582'];

  it('comes before a session that scans is finished, and is one entry [S29]', () => {
    const desk = atEnd();
    expect(() => desk.do({ kind: 'finish' })).toThrow('sleeves');
    desk.do(sleeve('417'));
    expect(() => desk.do(sleeve('417'))).toThrow('in already');
    desk.do(sleeve('582'));
    expect(desk.do({ kind: 'note-inventory-end', codes, reason: '' })).toMatchObject([
      { kind: 'inventory-ended', payload: { codes: 2, missing: [], foreign: [] } },
    ]);
    desk.do({ kind: 'finish' });
    expect(desk.state.phase).toBe('finished');
  });

  it('names what is missing and what is foreign; without all of them it takes a reason and is a deviation [S30]', () => {
    const desk = atEnd();
    desk.do(sleeve('417'));
    desk.do(sleeve('903', false));
    expect(desk.do(sleeve('903', false))).toEqual([]);
    expect(() => desk.do({ kind: 'note-inventory-end', codes, reason: '' })).toThrow('Not found: 582');
    expect(desk.do({ kind: 'note-inventory-end', codes, reason: 'left in the van' })).toMatchObject([
      { kind: 'inventory-ended', payload: { missing: ['582'], foreign: ['903'], reason: 'left in the van' } },
      {
        kind: 'deviation-recorded',
        payload: { text: 'The inventory was ended with 1 of 2 codes not found: left in the van' },
      },
    ]);
  });

  it('is not asked for where nothing was scanned [S29]', () => {
    const desk = new MachineSession(planWith(undefined));
    expect(() => desk.do(sleeve('417'))).toThrow('after the last trial');
  });
});
