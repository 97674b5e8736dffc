import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { conductorMetal } from '#shared/cables/conductor-metal.ts';
import { contradictionsOf } from '#shared/cables/contradictions.ts';
import { purityPercent } from '#shared/cables/purity.ts';
import { cableDraft } from '#shared/contracts/cables.ts';
import { type Construction, conductorMaterials } from '#shared/contracts/construction.ts';
import {
  constructionValuesOf,
  soundConstruction,
  typedConstruction,
} from '../../../src/features/cables/construction-values.ts';

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
});
