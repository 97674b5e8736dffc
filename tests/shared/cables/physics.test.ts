import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { complex, minus, times } from '#shared/cables/complex.ts';
import { conductorResistance, loopResistance } from '#shared/cables/dc-resistance.ts';
import { levelAt, levelDifference } from '#shared/cables/level-difference.ts';
import { coaxialLine, parallelWires, starQuad, twistedPair } from '#shared/cables/line-geometry.ts';
import { resistivityFromIacs } from '#shared/cables/resistivity.ts';
import { roundWireSkinEffect, skinEffect } from '#shared/cables/round-wire.ts';
import { skinDepth } from '#shared/cables/skin-depth.ts';
import { type LineConstants, twoPortOf } from '#shared/cables/two-port.ts';
import { areaOfDiameter, diameterOfArea, diameterOfGauge, gaugeOfDiameter } from '#shared/cables/wire-gauge.ts';

const copper = resistivityFromIacs(100, 20, 0.00393);
const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const line = fc.record({
  resistance: between(1e-3, 1),
  inductance: between(1e-8, 2e-6),
  conductance: between(0, 1e-8),
  capacitance: between(0, 1e-9),
});
const fixed = (constants: LineConstants) => ({
  constantsAt: () => constants,
});
const speaker = { sourceOhms: 0.05, load: { type: 'resistor', resistance: 8 } as const };
const plain = (resistance: number, inductance: number, capacitance = 0) => ({
  resistance,
  inductance,
  conductance: 0,
  capacitance,
});

describe('a conductor', () => {
  it('falls in resistance with area and rises with length, resistivity and temperature [Q1]', () => {
    fc.assert(
      fc.property(between(1e-9, 1e-4), between(1.001, 10), between(-50, 150), (area, more, temperature) => {
        expect(conductorResistance(copper, area * more)).toBeLessThan(conductorResistance(copper, area));
        const ohms = conductorResistance(copper, area);
        expect(loopResistance(ohms, ohms, 1, more)).toBeGreaterThan(loopResistance(ohms, ohms, 1, 1));
        expect(resistivityFromIacs(100, temperature + 1, 0.00393)).toBeGreaterThan(
          resistivityFromIacs(100, temperature, 0.00393),
        );
      }),
    );
  });

  it('converts gauge, diameter and area there and back [Q1]', () => {
    fc.assert(
      fc.property(between(-3, 60), (gauge) => {
        const diameter = diameterOfGauge(gauge);
        expect(gaugeOfDiameter(diameter)).toBeCloseTo(gauge, 9);
        expect(diameterOfArea(areaOfDiameter(diameter)) / diameter).toBeCloseTo(1, 12);
      }),
    );
  });
});

describe('a round wire', () => {
  it('has its direct-current resistance as the limit, and never less [Q2]', () => {
    expect(skinEffect(0)).toEqual({ resistanceRatio: 1, internalInductanceRatio: 1 });
    fc.assert(
      fc.property(between(0, 1e6), between(1, 3), (x, more) => {
        const near = skinEffect(x);
        const far = skinEffect(x * more);
        expect(near.resistanceRatio).toBeGreaterThanOrEqual(1);
        expect(far.resistanceRatio).toBeGreaterThanOrEqual(near.resistanceRatio * (1 - 1e-14));
        expect(far.internalInductanceRatio).toBeLessThanOrEqual(near.internalInductanceRatio * (1 + 1e-14));
      }),
    );
    // 1 + x⁴/192 for small x: Rosa & Grover (1912).
    expect((skinEffect(0.05).resistanceRatio - 1) / (0.05 ** 4 / 192)).toBeCloseTo(1, 4);
  });

  it('does not overflow, and its two ways of computing meet [Q2]', () => {
    const [below, above] = [skinEffect(50 * (1 - 1e-13)), skinEffect(50)];
    expect(above.resistanceRatio / below.resistanceRatio).toBeCloseTo(1, 11);
    expect(above.internalInductanceRatio / below.internalInductanceRatio).toBeCloseTo(1, 11);
    // Far out, a skin of one depth on the rim: x / (2 sqrt 2) + 1/4.
    expect(skinEffect(1e7).resistanceRatio / (1e7 / (2 * Math.SQRT2) + 0.25)).toBeCloseTo(1, 12);
  });

  it('of gauge 12 at 20 kHz has 1.353 times its resistance, and copper a depth of 0.467 mm [Q2]', () => {
    expect(roundWireSkinEffect(diameterOfGauge(12), copper, 20_000).resistanceRatio).toBeCloseTo(1.352984, 6);
    expect(skinDepth(copper, 20_000)).toBeCloseTo(0.4673e-3, 7);
  });
});

describe('geometry', () => {
  it('gives a product of L and C that the insulation alone decides [Q3]', () => {
    fc.assert(
      fc.property(between(1e-4, 5e-3), between(1.5, 40), between(1, 10), (diameter, apart, permittivity) => {
        const speed = 299_792_458;
        for (const shape of [parallelWires, coaxialLine, starQuad]) {
          const { externalInductance, capacitance } = shape(diameter * apart, diameter, permittivity);
          expect((externalInductance * capacitance * speed ** 2) / permittivity).toBeCloseTo(1, 8);
        }
      }),
    );
  });

  it('of a star quad of thin wires is what the partial inductances of four wires add up to [Q3]', () => {
    // Four thin wires at the corners of a square, opposite ones sharing the current, by their distances.
    const [diagonal, diameter] = [8e-3, 1e-3];
    const side = diagonal / Math.SQRT2;
    const flux = 0.5 * (Math.log(1 / (diameter / 2)) + Math.log(1 / diagonal) - 2 * Math.log(1 / side));
    const loop = 2 * 2e-7 * flux;
    expect(starQuad(diagonal, diameter, 2.3).externalInductance / loop).toBeCloseTo(1, 8);
    expect(twistedPair(5e-3, 1e-3, 2.3, 10).externalInductance).toBeCloseTo(0.91697e-6, 10);
  });

  it('refuses wires that touch [Q3]', () => {
    expect(() => parallelWires(1e-3, 1e-3, 2)).toThrow(RangeError);
    expect(() => starQuad(1.4e-3, 1e-3, 2)).toThrow(RangeError);
    expect(() => coaxialLine(1e-3, 2e-3, 2)).toThrow(RangeError);
  });
});

describe('a line', () => {
  it('is reciprocal, and two halves make the whole [Q4]', () => {
    fc.assert(
      fc.property(line, between(0.1, 100), between(1, 1e6), (constants, length, frequency) => {
        const { a, b, c, d } = twoPortOf(constants, length, frequency);
        const determinant = minus(times(a, d), times(b, c));
        const size = 1 + a.re ** 2 + a.im ** 2;
        expect(Math.abs(determinant.re - 1) / size).toBeLessThan(1e-12);
        expect(Math.abs(determinant.im) / size).toBeLessThan(1e-12);
        const half = twoPortOf(constants, length / 2, frequency);
        const whole = times(half.a, half.a);
        const crossed = times(half.b, half.c);
        expect(Math.hypot(whole.re + crossed.re - a.re, whole.im + crossed.im - a.im) / size).toBeLessThan(1e-12);
      }),
    );
  });

  it('stands without conductance and capacitance, and is then its series impedance [Q4]', () => {
    const { a, b, c } = twoPortOf(plain(0.1, 1e-6), 10, 1000);
    expect([a, c]).toEqual([complex(1), complex(0)]);
    expect(b.re).toBeCloseTo(1, 12);
    expect(b.im).toBeCloseTo(2 * Math.PI * 1000 * 1e-5, 12);
    expect(
      levelAt({ ...fixed(plain(0.1, 0)), length: 10 }, { sourceOhms: 1, load: { type: 'resistor', resistance: 8 } }, 0),
    ).toBeCloseTo(20 * Math.log10(0.8), 12);
  });
});

describe('two cables', () => {
  it('of equal constants differ by nothing, and change sign when they change places [Q5]', () => {
    fc.assert(
      fc.property(line, line, between(0.1, 50), (one, other, length) => {
        const [first, second] = [
          { ...fixed(one), length },
          { ...fixed(other), length },
        ];
        expect(Math.abs(levelDifference(first, first, speaker, 4).largest.decibels)).toBe(0);
        const there = levelDifference(first, second, speaker, 4).curve;
        const back = levelDifference(second, first, speaker, 4).curve;
        there.forEach(({ decibels }, index) => {
          expect(decibels).toBe(-(back[index]?.decibels ?? Number.NaN) || 0);
        });
      }),
      { numRuns: 30 },
    );
  });

  it('loses more level the longer it is, into a resistance [Q5]', () => {
    fc.assert(
      fc.property(between(0.001, 1), between(0.1, 50), between(1.01, 5), (resistance, length, more) => {
        const cable = fixed(plain(resistance, 5e-7));
        expect(levelAt({ ...cable, length: length * more }, speaker, 1000)).toBeLessThan(
          levelAt({ ...cable, length }, speaker, 1000),
        );
      }),
    );
  });

  it('finds where they differ most, in the audible band apart [Q5]', () => {
    const circuit = { sourceOhms: 0.05, load: { type: 'resistor', resistance: 4 } as const };
    const of = (inductance: number) => ({ ...fixed(plain(0.0104, inductance)), length: 10 });
    const { largest, largestAudible, curve } = levelDifference(of(0.6e-6), of(1.2e-6), circuit);
    expect(curve[0]?.frequency).toBe(1);
    expect(curve.at(-1)?.frequency).toBeCloseTo(100_000, 6);
    expect(largest.frequency).toBeCloseTo(100_000, 6);
    expect(largestAudible.frequency).toBe(20_000);
    // Lumped by hand: |4.154 + j w 12e-6| over |4.154 + j w 6e-6|.
    const w = 2 * Math.PI * 20_000;
    const byHand = 20 * Math.log10(Math.hypot(4.154, w * 12e-6) / Math.hypot(4.154, w * 6e-6));
    expect(largestAudible.decibels).toBeCloseTo(byHand, 6);
  });
});
