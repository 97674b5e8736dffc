import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { differenceWords } from '#shared/cables/difference-words.ts';
import { levelDifference } from '#shared/cables/level-difference.ts';
import { predictedConductor, predictedSkinEffect } from '#shared/cables/predicted-conductor.ts';
import {
  predictedCapacitance,
  predictedInductance,
  predictedLegs,
  predictedLine,
} from '#shared/cables/predicted-line.ts';
import type { Prediction } from '#shared/cables/prediction.ts';
import type { Construction } from '#shared/contracts/construction.ts';
import { consequenceRows, consequenceWords } from '../../../src/features/cables/consequence-rows.ts';
import { crossSectionLayout, type Disc } from '../../../src/features/cables/cross-section-layout.ts';
import { siFigure } from '../../../src/features/cables/si-figure.ts';

const told = <Value>(prediction: Prediction<Value>): Value => {
  if (!prediction.isKnown) throw new Error(`not known: ${prediction.lacks.join()} ${prediction.because ?? ''}`);
  return prediction.value;
};
const twin = (areaMm2: number, spacingMm: number): Construction => ({
  material: 'copper',
  build: 'stranded',
  areaMm2,
  permittivity: 2.3,
  geometry: 'parallel',
  spacingMm,
});

describe('what follows from a construction', () => {
  it('is the wire table’s resistance and the exact AC ratio for gauge 12 [Q10]', () => {
    const gauge12 = twin(3.308773, 6);
    // Copper Wire Tables: 5.21 ohm/km; mpmath: 1.35298 at 20 kHz.
    expect(told(predictedConductor(gauge12)).resistance).toBeCloseTo(5.2108e-3, 6);
    expect(told(predictedLegs(gauge12))).toEqual({
      go: expect.closeTo(5.2108e-3, 6),
      back: expect.closeTo(5.2108e-3, 6),
    });
    expect(told(predictedSkinEffect(gauge12, 20_000)).resistanceRatio).toBeCloseTo(1.35298, 4);
    const words = consequenceWords(gauge12, 5000).map((sentence) => sentence.replaceAll('\u00a0', ' '));
    expect(words).toEqual([
      'There and back, 5 m of it have 52.1 mΩ at 20 °C.',
      'At 20 kHz the resistance of a conductor is 35.3 % above that at DC.',
    ]);
  });

  it('counts inductance inside the conductors once each, and a coaxial shield not [Q10]', () => {
    // mpmath: 0.91697 uH/m outside, mu0 / 8 pi = 0.05 uH/m inside each; 27.908 pF/m.
    const pair = { ...twin(Math.PI / 4, 5) };
    expect(told(predictedInductance(pair, 0))).toBeCloseTo(1.01697e-6, 10);
    expect(told(predictedCapacitance(pair))).toBeCloseTo(27.908e-12, 14);
    const coax: Construction = {
      material: 'copper',
      build: 'solid',
      areaMm2: (Math.PI / 4) * 0.81 ** 2,
      geometry: 'coaxial',
      shieldDiameterMm: 2.95,
      shieldAreaMm2: 2,
      permittivity: 2.25,
    };
    expect(told(predictedInductance(coax, 0))).toBeCloseTo(0.25851e-6 + 0.05e-6, 10);
    expect(told(predictedLegs(coax)).back).toBeCloseTo(1 / (58e6 * 2e-6), 9);
  });

  it('takes litz strand by strand: less than the solid wire, never below direct current [Q10]', () => {
    fc.assert(
      fc.property(fc.integer({ min: 2, max: 1000 }), fc.double({ min: 0.05, max: 0.5, noNaN: true }), (strands, mm) => {
        const made = { material: 'copper', strands, strandDiameterMm: mm } as const;
        const ratio = (build: 'solid' | 'litz') =>
          told(predictedSkinEffect({ ...made, build }, 20_000)).resistanceRatio;
        expect(ratio('litz')).toBeGreaterThanOrEqual(1);
        expect(ratio('litz')).toBeLessThan(ratio('solid'));
      }),
    );
  });

  it('halves with two conductors in each leg, and lengthens with the twist [Q10]', () => {
    const single: Construction = { material: 'copper', areaMm2: 1, geometry: 'twisted-pair', spacingMm: 4 };
    const { go } = told(predictedLegs(single));
    expect(told(predictedLegs({ ...single, conductorsPerLeg: 2 })).go).toBeCloseTo(go / 2, 12);
    // 4 mm across in turns of 4 pi mm: a slope of 1, sqrt(2) longer.
    expect(told(predictedLegs({ ...single, pitchMm: 4 * Math.PI })).go / go).toBeCloseTo(Math.SQRT2, 9);
  });

  it('names what it would need, and says why where nothing helps [Q10]', () => {
    expect(predictedConductor({})).toEqual({ isKnown: false, lacks: ['material', 'areaMm2'] });
    expect(predictedConductor({ material: 'other', areaMm2: 1 })).toEqual({ isKnown: false, lacks: ['percentIacs'] });
    expect(predictedCapacitance(twin(1, 3)).isKnown).toBe(true);
    expect(predictedCapacitance({ ...twin(1, 3), permittivity: undefined })).toMatchObject({ lacks: ['permittivity'] });
    expect(predictedInductance({ ...twin(1, 3), geometry: 'braided' }, 0)).toMatchObject({ isKnown: false, lacks: [] });
    expect(predictedInductance(twin(Math.PI, 1.5), 0)).toMatchObject({ because: expect.stringContaining('touch') });
    const clad = { ...twin(1, 3), material: 'copper-clad-aluminium' as const };
    expect(predictedSkinEffect(clad, 1000)).toMatchObject({ because: expect.stringContaining('Two metals') });
    expect(consequenceRows({}, 1000).every(({ figure }) => !figure.isKnown)).toBe(true);
    expect(consequenceWords({}, 1000)).toEqual([]);
  });

  it('makes lines whose levels differ as their resistance says [Q10]', () => {
    const [thin, thick] = [told(predictedLine(twin(0.5, 2.2), 6000)), told(predictedLine(twin(4, 4.6), 6000))];
    const circuit = { sourceOhms: 0, load: { type: 'resistor', resistance: 8 } as const };
    const low = levelDifference(thick, thin, circuit).curve[0]?.decibels;
    const loop = (areaMm2: number) => (2 * 6) / (58e6 * areaMm2 * 1e-6);
    expect(low).toBeCloseTo(20 * Math.log10((8 + loop(0.5)) / (8 + loop(4))), 6);
  });

  it('is written with three digits and the prefix that fits [Q10]', () => {
    expect([0.0521, 9.17e-7, 2.79e-11, 0.9999, 12.34, 0].map((value) => siFigure(value, 'Ω'))).toEqual(
      ['52.1 mΩ', '917 nΩ', '27.9 pΩ', '1.00 Ω', '12.3 Ω', '0 Ω'].map((text) => text.replace(' ', '\u00a0')),
    );
  });
});

describe('two constructions on the study form', () => {
  const circuit = { sourceOhms: 0, load: { type: 'resistor', resistance: 8 } as const };
  const between = (one: Construction, other: Construction) =>
    differenceWords(levelDifference(told(predictedLine(one, 6000)), told(predictedLine(other, 6000)), circuit));

  it('are said to differ by what their loops make of the load, before and after matching [Q12]', () => {
    // By hand: 20 log10((8 + 12/(58 * 0.5)) / (8 + 12/(58 * 4))) = 0.382 dB at low frequency.
    const words = between(twin(0.5, 2.2), twin(4, 4.6)).replaceAll('\u00a0', ' ');
    expect(words).toMatch(/^By their construction the two differ by at most 0\.38 dB between 20 Hz and 20 kHz, at /);
    expect(words).toMatch(/matched in level at 1 kHz, by at most 0\.0\d+ dB\.$/);
    expect(between(twin(1, 3), twin(1, 3))).toContain('less than 0.001');
  });
});

describe('the drawn cross-section', () => {
  const overlaps = (discs: readonly Disc[]) =>
    discs.some((one, index) =>
      discs
        .slice(index + 1)
        .some((other) => Math.hypot(one.x - other.x, one.y - other.y) < one.radius + other.radius - 1e-9),
    );

  it('draws every strand to scale, none through another [Q11]', () => {
    const layout = crossSectionLayout({ ...twin(0.5, 2.2), strands: 16, strandDiameterMm: 0.2 });
    expect([layout?.go.length, layout?.back.length]).toEqual([16, 16]);
    expect(overlaps([...(layout?.go ?? []), ...(layout?.back ?? [])])).toBe(false);
    expect(layout?.go.every(({ radius }) => radius === 0.1)).toBe(true);
    // Too close for strands laid like this: one disc of the same metal.
    const close = crossSectionLayout({ ...twin(0.5, 0.82), strands: 16, strandDiameterMm: 0.2 });
    expect(close?.go).toHaveLength(1);
    const mean = (layout?.back ?? []).reduce((sum, { x }) => sum + x, 0) / 16;
    expect(mean).toBeCloseTo(1.1, 1);
  });

  it('crosses the legs of a star quad, puts a core in its shield, and draws nothing it was not told [Q11]', () => {
    const quad = crossSectionLayout({ areaMm2: Math.PI / 4, geometry: 'star-quad', spacingMm: 4 });
    expect(quad?.go.map(({ x, y }) => [x, y])).toEqual([
      [-2, 0],
      [2, 0],
    ]);
    expect(quad?.back.map(({ x, y }) => [x, y])).toEqual([
      [0, -2],
      [0, 2],
    ]);
    const coax = crossSectionLayout({ areaMm2: 0.5, geometry: 'coaxial', shieldDiameterMm: 3, outsideMm: 5 });
    expect(coax).toMatchObject({ shieldRadius: 1.5, outsideRadius: 2.5, extent: 2.5, back: [] });
    expect(crossSectionLayout({})).toBeUndefined();
    expect(crossSectionLayout({ areaMm2: 0.5, geometry: 'parallel' })).toBeUndefined();
    expect(crossSectionLayout(twin(Math.PI, 1.5))).toBeUndefined();
    expect(crossSectionLayout({ ...twin(1, 3), geometry: 'braided' })).toBeUndefined();
  });
});
