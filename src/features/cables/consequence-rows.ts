import { predictedConductor, predictedSkinEffect } from '#shared/cables/predicted-conductor.ts';
import { predictedCapacitance, predictedInductance, predictedLegs } from '#shared/cables/predicted-line.ts';
import type { Prediction } from '#shared/cables/prediction.ts';
import { skinDepth } from '#shared/cables/skin-depth.ts';
import type { Construction } from '#shared/contracts/construction.ts';
import { formatLength, withUnit } from '../../lib/format.ts';
import { siFigure, threeDigits } from './si-figure.ts';

/** One figure that follows from a construction, with what stands behind it. */
export interface ConsequenceRow {
  readonly label: string;
  readonly figure: Prediction<string>;
  readonly formula: string;
  readonly source: string;
}

const said = <Value>(prediction: Prediction<Value>, words: (value: Value) => string): Prediction<string> =>
  prediction.isKnown ? { isKnown: true, value: words(prediction.value) } : prediction;

const both = (perMetre: number, unit: string, lengthMm: number) =>
  `${siFigure(perMetre, unit)}/m, ${siFigure((perMetre * lengthMm) / 1000, unit)} in ${formatLength(lengthMm)}`;

const fields = 'Ramo, Whinnery & Van Duzer, Fields and Waves in Communication Electronics, 3rd ed. (1994)';

const geometryFormulas: Record<NonNullable<Construction['geometry']>, { l: string; c: string; source: string }> = {
  parallel: { l: 'μ₀/π · arcosh(s/d)', c: 'π ε₀ εᵣ / arcosh(s/d)', source: `${fields}, table 5.11b` },
  'twisted-pair': {
    l: 'μ₀/π · arcosh(s/d), longer by √(1 + (πs/p)²)',
    c: 'π ε₀ εᵣ / arcosh(s/d), longer by √(1 + (πs/p)²)',
    source: 'A parallel pair lengthened by its twist: an approximation; common practice, no source',
  },
  'star-quad': {
    l: 'μ₀/2π · ln(s/d), s between opposite conductors',
    c: '2π ε₀ εᵣ / ln(s/d), s between opposite conductors',
    source: 'Four thin wires by their distances, an approximation: Grover, Inductance Calculations (1946), chapter 5',
  },
  coaxial: { l: 'μ₀/2π · ln(D/d)', c: '2π ε₀ εᵣ / ln(D/d)', source: `${fields}, table 5.11b` },
  braided: { l: 'none', c: 'none', source: 'none' },
};

/** Everything that is said of a cable from its construction, in the order of the page. */
export function consequenceRows(construction: Construction, lengthMm: number): ConsequenceRow[] {
  const conductor = predictedConductor(construction);
  const { l, c, source } = geometryFormulas[construction.geometry ?? 'parallel'];
  const isLitz = construction.build === 'litz';
  const depthAt = (frequency: number, label: string): ConsequenceRow => ({
    label: `Skin depth at ${label}`,
    figure: said(conductor, ({ resistivity }) => withUnit(threeDigits(skinDepth(resistivity, frequency) * 1000), 'mm')),
    formula: 'δ = √(ρ / (π f μ₀)): where the current’s density has fallen to 1/e in a thick conductor',
    source: `${fields}, section 3.16`,
  });
  return [
    {
      label: 'Loop resistance at 20 °C',
      figure: said(predictedLegs(construction), ({ go, back }) => both(go + back, 'Ω', lengthMm)),
      formula: 'R = ρ / A for each leg, there and back; a coaxial cable’s shield is taken as copper',
      source: conductor.isKnown ? `Conductivity: ${conductor.value.source}` : 'IEC 60028 (1925)',
    },
    depthAt(1000, '1 kHz'),
    depthAt(10_000, '10 kHz'),
    depthAt(20_000, '20 kHz'),
    {
      label: 'Resistance at 20 kHz over that at DC',
      figure: said(
        predictedSkinEffect(construction, 20_000),
        ({ resistanceRatio }) => `${resistanceRatio.toFixed(4)} ×`,
      ),
      formula: `Z/R = (ka/2) J₀(ka)/J₁(ka), k = √(−jωμ₀/ρ)${isLitz ? ', for one strand' : ', a stranded conductor as the solid wire of its cross-section'}; the field of neighbours is left out`,
      source: 'Rosa & Grover, Bulletin of the Bureau of Standards 8 (1912), section 8',
    },
    {
      label: 'Inductance at 1 kHz',
      figure: said(predictedInductance(construction, 1000), (value) => both(value, 'H', lengthMm)),
      formula: `L = ${l}, and the conductors’ own, μ₀/8π each at low frequency`,
      source,
    },
    {
      label: 'Capacitance',
      figure: said(predictedCapacitance(construction), (value) => both(value, 'F', lengthMm)),
      formula: `C = ${c}; all of the field taken to lie in the insulation, so an upper limit where air surrounds it`,
      source,
    },
  ];
}

/** What matters most, in words. */
export function consequenceWords(construction: Construction, lengthMm: number): string[] {
  const legs = predictedLegs(construction);
  const skin = predictedSkinEffect(construction, 20_000);
  const words: string[] = [];
  if (legs.isKnown) {
    const ohms = ((legs.value.go + legs.value.back) * lengthMm) / 1000;
    words.push(`There and back, ${formatLength(lengthMm)} of it have ${siFigure(ohms, 'Ω')} at 20 °C.`);
  }
  if (skin.isKnown) {
    const percent = (skin.value.resistanceRatio - 1) * 100;
    words.push(
      percent < 0.1
        ? 'At 20 kHz the resistance of a conductor is less than 0.1 % above that at DC.'
        : `At 20 kHz the resistance of a conductor is ${percent.toFixed(1)} % above that at DC.`,
    );
  }
  return words;
}
