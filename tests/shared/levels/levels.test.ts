import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { differenceOf, driftOf, gainDifference, judgeLevels, levelsOf } from '#shared/levels/compare-levels.ts';
import { levelFaults, levelQuestions } from '#shared/levels/level-faults.ts';
import { dbuOfDbV, dbVOfDbu, dbVOfVolts, levelMilliDb, voltsOfDbV } from '#shared/levels/level-units.ts';
import { dbText } from '#shared/levels/level-words.ts';
import { readReading } from '#shared/levels/read-reading.ts';
import { gradeOf } from '#shared/levels/registered-levels.ts';
import { measured, registered } from '../../support/levels.ts';

const now = Date.parse('2026-12-05T18:00:00.000Z');

describe('units of level', () => {
  it('convert and invert [S63]', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.001, max: 200, noNaN: true }), (volts) => {
        expect(voltsOfDbV(dbVOfVolts(volts))).toBeCloseTo(volts, 9);
        expect(dbVOfDbu(dbuOfDbV(dbVOfVolts(volts)))).toBeCloseTo(dbVOfVolts(volts), 9);
      }),
      { numRuns: 50 },
    );
  });

  // 20 log10 of 1.0058, 1.0116, 1.0233 and 1.0593: the percentages of practice.
  it.each([
    [2_000_000, 2_011_545, 50],
    [2_000_000, 2_023_160, 100],
    [2_000_000, 2_046_586, 200],
    [2_000_000, 2_118_507, 500],
  ])('turn %i and %i microvolts into %i thousandths of a decibel [S63]', (quiet, loud, milliDb) => {
    expect(levelMilliDb([loud], 'V') - levelMilliDb([quiet], 'V')).toBe(milliDb);
  });

  it('know 0 dBu as 0.775 V, and average voltages as voltages [S63]', () => {
    expect(levelMilliDb([0], 'dBu')).toBe(-2218);
    expect(levelMilliDb([774_597], 'V')).toBe(-2218);
    expect(levelMilliDb([1_000_000, 3_000_000], 'V')).toBe(6021);
    expect(() => levelMilliDb([0], 'V')).toThrow(RangeError);
  });
});

describe('a reading', () => {
  it.each([
    ['2.000', 'V', 2_000_000],
    ['2,000', 'V', 2_000_000],
    ['1998 mV', 'V', 1_998_000],
    [' 0,5v ', 'V', 500_000],
    ['-3.25', 'dBV', -3250],
    ['−3,25 dBV', 'dBV', -3250],
    ['+0.1 dB', 'dB', 100],
  ] as const)('%s in %s is %i [S60]', (text, unit, value) => {
    expect(readReading(text, unit)).toEqual({ value });
  });

  it.each([
    ['2000', 'V', /more than 200 V.*millivolts/],
    ['-3.2', 'V', /below 0.*choose dB/],
    ['-3.2 dBV', 'V', /is in dBV, and this table is in volts/],
    ['2 V', 'dBV', /is a voltage, and this table is in dBV/],
    ['2000', 'dBV', /no level in dBV/],
    ['1,234.5', 'V', /one decimal sign/],
    ['two', 'V', /not a number/],
    ['3 dBA', 'dB', /not known here/],
    ['', 'V', /missing/],
  ] as const)('%s in %s is refused in plain words [S60]', (text, unit, fault) => {
    expect(readReading(text, unit)).toEqual({ fault: expect.stringMatching(fault) });
  });
});

describe('differences', () => {
  it('are the same whichever code comes first, and their sign turns [S63]', () => {
    const milliDb = fc.integer({ min: -60_000, max: 40_000 });
    fc.assert(
      fc.property(milliDb, milliDb, (a, b) => {
        const levels = levelsOf(measured({ '317': [a, a], '528': [b, b] }, { unit: 'dBV' }));
        const [first, , second] = levels;
        if (first === undefined || second === undefined) throw new Error('two codes were measured');
        expect(differenceOf(first, second) + differenceOf(second, first)).toBe(0);
        const forth = gainDifference(levels);
        expect(gainDifference([...levels].reverse())?.milliDb).toBe(forth?.milliDb);
        expect(forth?.milliDb).toBe(Math.abs(a - b));
      }),
      { numRuns: 50 },
    );
  });

  it.each([
    [0, 'target'],
    [50, 'target'],
    [51, 'pass'],
    [100, 'pass'],
    [101, 'warn'],
    [200, 'warn'],
    [201, 'fail'],
  ] as const)('of %i thousandths of a decibel are graded %s [S63]', (milliDb, grade) => {
    expect(gradeOf(milliDb, registered())).toBe(grade);
  });

  it('count the worst channel, and a move since the start [S63]', () => {
    const before = measured({ '317': [0, 0], '528': [20, 90] }, { unit: 'dB' });
    const after = measured({ '317': [0, 0], '528': [20, 195] }, { unit: 'dB', check: 'after' });
    expect(judgeLevels(before, null, registered())).toEqual({ grade: 'pass', isDrifted: null });
    expect(judgeLevels(after, before, registered())).toEqual({ grade: 'warn', isDrifted: true });
    expect(driftOf(levelsOf(before), levelsOf(after))).toBe(105);
  });

  it('are never written smaller than they were measured [S63]', () => {
    expect([100, 101, 104, 0].map(dbText)).toEqual(['0.10 dB', '0.11 dB', '0.11 dB', '0.00 dB']);
  });
});

describe('a measurement', () => {
  const codes = ['317', '528'];
  const whole = measured({ '317': [0, 0], '528': [50, 50] }, { unit: 'dBV' });

  it('is complete with every code, channel and frequency [S61]', () => {
    expect(levelFaults(whole, codes, registered(), null)).toEqual([]);
  });

  it('names what is missing, strange or doubled [S61]', () => {
    const texts = (rows: typeof whole.rows, of = registered()) =>
      levelFaults({ ...whole, rows }, codes, of, null).map(({ text }) => text);
    expect(texts(whole.rows.slice(0, 3))).toEqual(['528, right, 1 kHz is missing.']);
    expect(texts(whole.rows, registered({ frequenciesHz: [1000, 10_000] }))).toHaveLength(4);
    expect(texts(whole.rows.map((row) => ({ ...row, code: '999' })))).toContain('999 is no blind code of this study.');
    const [first] = whole.rows;
    if (first === undefined) throw new Error('a row');
    expect(texts([...whole.rows, first])).toEqual(['317, left, 1 kHz comes twice.']);
    expect(texts([...whole.rows, { ...first, channel: 'mono' }])[0]).toContain('or mono for every code');
  });

  it('after the start is not taken relative to another reference [S61]', () => {
    const relative = measured({ '317': [0, 0], '528': [0, 0] }, { unit: 'dB', check: 'after' });
    expect(levelFaults(relative, codes, registered(), whole)[0]?.text).toMatch(/cannot be compared/);
  });

  it('asks about spread, a large difference, bandwidth and calibration, and about nothing else [S62]', () => {
    const ids = (of: typeof whole) => levelQuestions(of, now).map(({ id }) => id);
    expect(ids(whole)).toEqual([]);
    const spread = whole.rows.map((row, index) => (index === 0 ? { ...row, readings: [0, 0, 300] } : row));
    expect(ids({ ...whole, rows: spread })).toEqual(['spread']);
    expect(ids(measured({ '317': [0, 0], '528': [4000, 0] }, { unit: 'dBV' }))).toEqual(['large']);
    expect(ids({ ...whole, instrument: { ...whole.instrument, bandwidthHz: 400 } })).toEqual(['bandwidth']);
    expect(ids({ ...whole, instrument: { ...whole.instrument, calibratedOn: null } })).toEqual(['calibration']);
    expect(ids({ ...whole, instrument: { ...whole.instrument, calibratedOn: '2023-01-01' } })).toEqual(['calibration']);
  });
});
