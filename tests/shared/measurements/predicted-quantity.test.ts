import { describe, expect, it } from 'vitest';
import type { Construction } from '#shared/contracts/construction.ts';
import { predictedQuantity } from '#shared/measurements/predicted-quantity.ts';
import { quantities } from '#shared/measurements/quantities.ts';

const twin: Construction = {
  material: 'copper',
  areaMm2: 2.5,
  geometry: 'parallel',
  spacingMm: 5,
  permittivity: 2.3,
};
const at = (quantity: (typeof quantities)[number], frequency: number, lengthMm = 5000) => {
  const found = predictedQuantity(quantity, twin, lengthMm, { sourceOhms: 0.05, loadOhms: 8 });
  if (!found.isKnown) throw new Error(`no prediction of ${quantity}`);
  return found.value(frequency);
};

describe('what a construction lets expect of a measurement', () => {
  it('is the loop of the whole piece [Q20]', () => {
    expect(at('resistance', 0)).toBeCloseTo((2 * 5) / (58e6 * 2.5e-6), 9);
    expect(at('resistance', 20_000)).toBeGreaterThan(at('resistance', 0));
    expect(at('impedance', 0)).toBeCloseTo(at('resistance', 0), 12);
    const reactance = 2 * Math.PI * 20_000 * at('inductance', 20_000);
    expect(at('impedance', 20_000)).toBeCloseTo(Math.hypot(at('resistance', 20_000), reactance), 12);
    expect(at('level', 20)).toBeCloseTo(20 * Math.log10(8 / (8.05 + at('resistance', 20))), 5);
  });

  it('grows with the length, quantity by quantity [Q20]', () => {
    for (const quantity of quantities.filter((each) => each !== 'level'))
      expect(at(quantity, 1000, 10_000) / at(quantity, 1000, 5000)).toBeCloseTo(2, 9);
  });

  it('says what it lacks, and predicts no level without a circuit [Q20]', () => {
    expect(predictedQuantity('capacitance', { ...twin, permittivity: undefined }, 5000)).toEqual({
      isKnown: false,
      lacks: ['permittivity'],
    });
    expect(predictedQuantity('level', twin, 5000).isKnown).toBe(false);
  });
});
