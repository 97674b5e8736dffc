import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { complex, magnitude, minus, times } from '#shared/cables/complex.ts';
import { valueAt } from '#shared/cables/interpolation.ts';
import { levelDifference } from '#shared/cables/level-difference.ts';
import { levelJudgement, noticeableLevels } from '#shared/cables/level-judgement.ts';
import { admittanceOf } from '#shared/cables/load.ts';
import { savingsOf } from '#shared/cables/savings.ts';
import { transferOf, twoPortOf } from '#shared/cables/two-port.ts';
import type { Construction } from '#shared/contracts/construction.ts';
import { meanAt, measuredLine } from '#shared/measurements/measured-line.ts';
import { readLoad } from '#shared/measurements/read-load.ts';

const copper: Construction = { material: 'copper', areaMm2: 2.5, geometry: 'parallel', spacingMm: 5 };
const eightOhms = { sourceOhms: 0, load: { type: 'resistor', resistance: 8 } } as const;

describe('two cables in one circuit', () => {
  const positive = (max: number) => fc.double({ min: max * 1e-6, max, noNaN: true });
  const line = fc.record({
    resistance: positive(1),
    inductance: positive(1e-5),
    conductance: fc.constant(0),
    capacitance: positive(1e-8),
  });

  it('are reciprocal two-ports, ad − bc = 1, and symmetric, at every frequency and length [Q4]', () => {
    fc.assert(
      fc.property(line, positive(1000), fc.double({ min: 0, max: 5, noNaN: true }), (constants, length, decade) => {
        const { a, b, c, d } = twoPortOf(constants, length, 10 ** decade);
        const determinant = minus(times(a, d), times(b, c));
        const size = Math.max(1, magnitude(times(a, d)));
        expect(magnitude(minus(determinant, complex(1))) / size).toBeLessThan(1e-9);
        expect(d).toEqual(a);
      }),
      { numRuns: 200 },
    );
  });

  it('in two halves are as the whole [Q4]', () => {
    fc.assert(
      fc.property(line, positive(100), positive(20_000), (constants, length, frequency) => {
        const half = twoPortOf(constants, length / 2, frequency);
        const whole = twoPortOf(constants, length, frequency);
        const chained = times(half.a, half.a);
        const across = times(half.b, half.c);
        expect(chained.re + across.re).toBeCloseTo(whole.a.re, 6);
        expect(chained.im + across.im).toBeCloseTo(whole.a.im, 6);
      }),
      { numRuns: 100 },
    );
  });

  it('never amplify into a resistance, and differ by as much the other way round [Q5]', () => {
    fc.assert(
      fc.property(line, line, fc.double({ min: 1, max: 100, noNaN: true }), (one, other, ohms) => {
        const circuit = { sourceOhms: 0.1, load: { type: 'resistor', resistance: ohms } } as const;
        const lineOf = (constants: typeof one) => ({ constantsAt: () => constants, length: 3 });
        const forth = levelDifference(lineOf(one), lineOf(other), circuit, 4);
        const back = levelDifference(lineOf(other), lineOf(one), circuit, 4);
        expect(forth.largestAudible.decibels).toBeCloseTo(-back.largestAudible.decibels, 9);
        const lossy = { ...one, inductance: 0, capacitance: 0 };
        const transfer = transferOf(twoPortOf(lossy, 3, 1000), complex(0.1), complex(1 / ohms));
        expect(magnitude(transfer)).toBeLessThanOrEqual(1);
      }),
      { numRuns: 60 },
    );
  });

  it('may stand before an impedance curve, typed or from a file [Q23]', () => {
    const { points, faults, hasPhase } = readLoad('f/Hz;Z/Ω;phase/°\n20;6,2;12\n2000;24,8;-30');
    expect([faults, hasPhase]).toEqual([[], true]);
    expect(points).toEqual([
      { frequency: 20, ohms: 6.2, degrees: 12 },
      { frequency: 2000, ohms: 24.8, degrees: -30 },
    ]);
    const load = { type: 'curve', points } as const;
    const middle = admittanceOf(load, 200);
    expect(1 / magnitude(middle)).toBeCloseTo(Math.sqrt(6.2 * 24.8), 9);
    expect((Math.atan2(-middle.im, middle.re) * 180) / Math.PI).toBeCloseTo(-9, 9);
    expect(1 / magnitude(admittanceOf(load, 1))).toBeCloseTo(6.2, 9);
    const flat = { type: 'curve', points: [{ frequency: 100, ohms: 8, degrees: 0 }] } as const;
    expect(admittanceOf(flat, 50).re).toBeCloseTo(1 / 8, 12);
    expect(readLoad('f/kHz;Z/Ω\n1;8').points).toEqual([{ frequency: 1000, ohms: 8, degrees: 0 }]);
    expect(readLoad('20;0').faults[0]?.detail).toContain('at least 0.1 Ω');
  });

  it('are interpolated over the logarithm of frequency, and keep their ends [Q23]', () => {
    const points = [
      { frequency: 100, value: 1 },
      { frequency: 10_000, value: 3 },
    ];
    expect([10, 100, 1000, 10_000, 1e6].map((at) => valueAt(points, at))).toEqual([1, 1, 2, 3, 3]);
    expect(() => valueAt([], 1)).toThrow(RangeError);
  });

  it('say what twice the cross-section saves against silver of the same size [Q24]', () => {
    const saved = savingsOf(copper, 10_000, eightOhms);
    if (!saved.isKnown) throw new Error('not known');
    const ohms = (2 * 10) / (58e6 * 2.5e-6);
    const level = (loop: number) => 20 * Math.log10(8 / (8 + loop));
    expect(saved.value.map(({ name }) => name)).toEqual(['as it is', 'twice the cross-section', 'silver, same size']);
    expect(saved.value[0]?.levelDb).toBeCloseTo(level(ohms), 9);
    expect(saved.value[1]?.levelDb).toBeCloseTo(level(ohms / 2), 9);
    expect(saved.value[2]?.levelDb).toBeCloseTo(level(ohms / 1.084), 9);
    expect(savingsOf({ material: 'copper' }, 1000, eightOhms).isKnown).toBe(false);
  });

  it('count as measured by the mean of their pieces, swept or at one frequency [Q24]', () => {
    const curves = [
      { quantity: 'resistance' as const, points: [{ frequency: null, value: 0.4 }] },
      {
        quantity: 'resistance' as const,
        points: [
          { frequency: 100, value: 0.2 },
          { frequency: 10_000, value: 0.4 },
        ],
      },
    ];
    expect(meanAt(curves, 'resistance', 1000)).toBeCloseTo(0.35, 12);
    expect(meanAt(curves, 'capacitance', 1000)).toBeNull();
    expect(measuredLine([])).toBeNull();
    expect(measuredLine(curves)?.constantsAt(10_000)).toEqual({
      resistance: 0.4,
      inductance: 0,
      conductance: 0,
      capacitance: 0,
    });
  });

  it('are judged against published just-noticeable differences, each with its source [Q25]', () => {
    expect([2, -0.5, 0.2, 0.05, 0.001].map((level) => levelJudgement(level).word)).toEqual([
      'noticeable',
      'noticeable',
      'between',
      'small',
      'hardly anything',
    ]);
    for (const { source } of noticeableLevels) expect(source).toMatch(/\(19\d\d\).*from memory/);
    expect(levelJudgement(0.005).plan).toContain('register a margin');
  });
});
