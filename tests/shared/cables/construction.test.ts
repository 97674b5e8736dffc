import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { conductorMetal } from '#shared/cables/conductor-metal.ts';
import { contradictionsOf } from '#shared/cables/contradictions.ts';
import { differenceWords } from '#shared/cables/difference-words.ts';
import { levelDifference } from '#shared/cables/level-difference.ts';
import { predictedLine } from '#shared/cables/predicted-line.ts';
import { purityPercent } from '#shared/cables/purity.ts';
import { cableDraft } from '#shared/contracts/cables.ts';
import {
  type Construction,
  conductorBuilds,
  conductorMaterials,
  construction,
  geometries,
} from '#shared/contracts/construction.ts';
import { consequenceRows } from '../../../src/features/cables/consequence-rows.ts';
import {
  constructionValuesOf,
  soundConstruction,
  typedConstruction,
} from '../../../src/features/cables/construction-values.ts';
import { crossSectionLayout } from '../../../src/features/cables/cross-section-layout.ts';

const fieldsOf = (made: Construction) => contradictionsOf(made).map(({ field }) => field);

describe('a construction', () => {
  it('is optional in a draft, as before there was one [Q6]', () => {
    const draft = { name: 'Outer run', kind: 'loudspeaker', lengthMm: 5000, description: '' };
    expect(cableDraft.parse(draft)).toEqual(draft);
    expect(cableDraft.safeParse({ ...draft, construction: { colour: 'red' } }).success).toBe(false);
  });

  it('is typed as text and read as numbers, and what is empty is left out [Q6]', () => {
    const made: Construction = { material: 'silver', strands: 7, areaMm2: 0.22, connectors: 'Bare ends' };
    expect(typedConstruction.parse(constructionValuesOf(made))).toEqual(made);
    expect(typedConstruction.parse(constructionValuesOf({}))).toEqual({});
    const half = { ...constructionValuesOf(made), areaMm2: '-', strands: '2.5' };
    expect(typedConstruction.safeParse(half).error?.issues.map(({ path }) => path[0])).toEqual(['strands', 'areaMm2']);
    expect(soundConstruction(half)).toEqual({ material: 'silver', connectors: 'Bare ends' });
  });

  it('says purity in nines as a percentage [Q8]', () => {
    expect(['1N', '2N', '3N', '4N', '4N5', '6N', '7N8'].map(purityPercent)).toEqual([
      '90',
      '99',
      '99.9',
      '99.99',
      '99.995',
      '99.9999',
      '99.999998',
    ]);
    for (const nonsense of ['', '4', 'N', '10N', '4n']) expect(() => purityPercent(nonsense)).toThrow(RangeError);
  });

  it('is told where strands and cross-section do not agree, beyond rounding [Q9]', () => {
    fc.assert(
      fc.property(fc.integer({ min: 2, max: 500 }), fc.double({ min: 0.05, max: 1, noNaN: true }), (strands, mm) => {
        const area = (strands * Math.PI * mm * mm) / 4;
        const of = (factor: number) =>
          fieldsOf({ build: 'stranded', strands, strandDiameterMm: mm, areaMm2: area * factor });
        expect(of(1.05)).toEqual([]);
        expect(of(1.2)).toEqual(['areaMm2']);
        expect(of(0.8)).toEqual(['areaMm2']);
      }),
    );
    expect(fieldsOf({ build: 'solid', strands: 7 })).toEqual(['strands']);
    expect(fieldsOf({ build: 'litz', strands: 1 })).toEqual(['strands']);
  });

  it('is told what does not fit in space, and what words exclude [Q9]', () => {
    // pi mm² is a wire of 2 mm.
    expect(fieldsOf({ areaMm2: Math.PI, geometry: 'parallel', spacingMm: 1.9 })).toEqual(['spacingMm']);
    expect(fieldsOf({ areaMm2: Math.PI, geometry: 'parallel', spacingMm: 2.5 })).toEqual([]);
    expect(fieldsOf({ areaMm2: Math.PI, geometry: 'star-quad', spacingMm: 2.5 })).toEqual(['spacingMm']);
    expect(fieldsOf({ areaMm2: Math.PI, geometry: 'coaxial', shieldDiameterMm: 1.5 })).toEqual(['shieldDiameterMm']);
    expect(fieldsOf({ spacingMm: 9, outsideMm: 8 })).toEqual(['outsideMm']);
    expect(fieldsOf({ shieldDiameterMm: 9, outsideMm: 8 })).toEqual(['outsideMm']);
    expect(fieldsOf({ geometry: 'star-quad', conductorsPerLeg: 1 })).toEqual(['conductorsPerLeg']);
    expect(fieldsOf({ geometry: 'coaxial', shield: 'none', shieldAreaMm2: 1 })).toEqual(['shield', 'shieldAreaMm2']);
    expect(fieldsOf({ material: 'copper', percentIacs: 108 })).toEqual(['percentIacs']);
    expect(fieldsOf({ material: 'silver', percentIacs: 106 })).toEqual([]);
  });

  it('has a conductivity with a source for every material but an unnamed one [Q1]', () => {
    for (const material of conductorMaterials) {
      const metal = conductorMetal({ material });
      if (material === 'other') expect(metal).toBeUndefined();
      else expect(metal?.source.length).toBeGreaterThan(10);
    }
    expect(conductorMetal({ material: 'other', percentIacs: 28 })?.percentIacs).toBe(28);
    expect(conductorMetal({})).toBeUndefined();
  });

  it('of any kind that the limits allow is answered, never refused by a formula [Q10]', () => {
    const measure = (min: number, max: number) => fc.option(fc.double({ min, max, noNaN: true }), { nil: undefined });
    const any = fc.record({
      material: fc.constantFrom(...conductorMaterials),
      build: fc.constantFrom(...conductorBuilds),
      geometry: fc.constantFrom(...geometries),
      percentIacs: measure(1, 120),
      strands: fc.option(fc.integer({ min: 1, max: 100_000 }), { nil: undefined }),
      conductorsPerLeg: fc.option(fc.integer({ min: 1, max: 100 }), { nil: undefined }),
      strandDiameterMm: measure(0.01, 20),
      areaMm2: measure(0.0001, 1000),
      permittivity: measure(1, 20),
      spacingMm: measure(0.01, 500),
      pitchMm: measure(1, 5000),
      shieldDiameterMm: measure(0.05, 200),
      shieldAreaMm2: measure(0.001, 1000),
      outsideMm: measure(0.05, 500),
    });
    fc.assert(
      fc.property(any, fc.constantFrom(1, 3000, 1_000_000), (made, lengthMm) => {
        const typed = construction.parse(made);
        expect(consequenceRows(typed, lengthMm)).toHaveLength(7);
        for (const { figure } of consequenceRows(typed, lengthMm))
          if (figure.isKnown) expect(figure.value).not.toMatch(/NaN|Infinity|∞/);
        crossSectionLayout(typed);
        const line = predictedLine(typed, lengthMm);
        if (!line.isKnown) return;
        const circuit = { sourceOhms: 0, load: { type: 'resistor', resistance: 8 } as const };
        const half = { ...line.value, length: line.value.length / 2 };
        expect(differenceWords(levelDifference(line.value, half, circuit, 2))).not.toMatch(/NaN|Infinity/);
      }),
      { numRuns: 1000 },
    );
  });
});
