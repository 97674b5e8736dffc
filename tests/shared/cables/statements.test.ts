import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { StatedCable } from '#shared/cables/statements/statement-rule.ts';
import { statementRules, statementsUnderTheLight } from '#shared/cables/statements/statements-under-the-light.ts';
import { type Construction, conductorBuilds, conductorMaterials, geometries } from '#shared/contracts/construction.ts';

const cable = (construction: Construction, description = ''): StatedCable => ({
  kind: 'loudspeaker',
  lengthMm: 5000,
  description,
  construction,
});
const found = (construction: Construction, description = '') =>
  statementsUnderTheLight(cable(construction, description)).map(({ rule }) => rule);
const detailOf = (rule: string, construction: Construction, description = '') =>
  statementsUnderTheLight(cable(construction, description)).find((each) => each.rule === rule)?.detail;

describe('statements under the light', () => {
  it('each have a reason and a source, and an id of their own [Q21]', () => {
    const ids = statementRules.map(({ id }) => id);
    expect(new Set(ids).size).toBe(ids.length);
    for (const { id, reason, source } of statementRules) {
      expect(reason.length, id).toBeGreaterThan(40);
      expect(source, id).toMatch(/\d{2}|common practice, no source/);
    }
  });

  const cases: [string, Construction, string, Construction, string?][] = [
    ['purity-beyond-grade', { material: 'copper-etp', nines: '5N' }, '', { material: 'copper-ofe', nines: '4N' }],
    ['purity-beyond-grade', { material: 'copper-of', nines: '4N' }, '', { material: 'copper-of', nines: '3N5' }],
    ['purity-beyond-analysis', { material: 'copper', nines: '7N' }, '', { material: 'copper', nines: '4N5' }],
    [
      'purity-and-conductivity',
      { material: 'copper', nines: '6N', percentIacs: 97 },
      '',
      { material: 'copper', nines: '4N', percentIacs: 101 },
    ],
    ['silver-by-the-area', { material: 'silver', areaMm2: 1 }, '', { material: 'copper', areaMm2: 1 }],
    [
      'plating-carries-little',
      { material: 'silver-plated-copper' },
      'The silver layer carries the treble.',
      { material: 'silver-plated-copper' },
      'Sold by the metre.',
    ],
    [
      'crystal-after-drawing',
      { material: 'copper-long-crystal', treatments: 'Annealed after drawing' },
      '',
      { material: 'copper-ofe', treatments: 'Annealed' },
    ],
    ['cold-treatment', { treatments: 'Cryogenic, 24 h' }, '', { treatments: 'Wound cool and dry' }],
    ['direction-and-settling', {}, 'Arrows show the direction.', {}, 'White sheath.'],
    [
      'skin-effect-in-thin-wire',
      { material: 'copper', areaMm2: 0.2, build: 'litz' },
      '',
      { material: 'copper', areaMm2: 6, build: 'litz' },
    ],
    ['beyond-the-band', {}, 'Reflections are absorbed up to 2 GHz.', {}, 'Flexible.'],
  ];
  for (const [rule, lit, words, dark, otherWords = ''] of cases)
    it(`${rule} speaks where it should, and is silent elsewhere [Q21]`, () => {
      expect(found(lit, words)).toContain(rule);
      expect(found(dark, otherWords)).not.toContain(rule);
    });

  it('say figures that can be checked [Q21]', () => {
    expect(detailOf('silver-by-the-area', { material: 'silver', areaMm2: 2.5 })).toBe(
      'Copper of 2.71 mm² conducts as well as this silver of 2.5 mm²: 8.4 % more cross-section.',
    );
    expect(detailOf('beyond-the-band', { permittivity: 2.25 }, 'No reflections.')).toBe(
      '“reflections” is stated. A wave of 20 kHz is 10.0 km long in this cable and crosses its 5 m in 25 ns.',
    );
  });

  it('count contradictions of fields among them, each under its field [Q21]', () => {
    expect(found({ build: 'solid', strands: 7 })).toEqual(['fields-that-contradict-strands']);
  });

  it('never fail, whatever is stated [Q21]', () => {
    const some = <Value>(values: readonly Value[]) => fc.option(fc.constantFrom(...values), { nil: undefined });
    const number = (max: number) => fc.option(fc.double({ min: 0.01, max, noNaN: true }), { nil: undefined });
    const made = fc.record({
      material: some(conductorMaterials),
      build: some(conductorBuilds),
      geometry: some(geometries),
      nines: some(['1N', '4N', '4N5', '9N9']),
      percentIacs: number(110),
      areaMm2: number(100),
      strandDiameterMm: number(10),
      permittivity: fc.option(fc.double({ min: 1, max: 20, noNaN: true }), { nil: undefined }),
      treatments: some(['cryo, litz, 5 MHz, burn-in, annealed, silver layer', '']),
    });
    fc.assert(
      fc.property(made, fc.integer({ min: 1, max: 1_000_000 }), (construction, lengthMm) => {
        const all = statementsUnderTheLight({ kind: 'other', lengthMm, description: 'directional', construction });
        for (const { detail } of all) expect(detail).not.toMatch(/NaN|undefined|Infinity/);
      }),
      { numRuns: 100 },
    );
  });
});
