import type { Construction } from '#shared/contracts/construction.ts';
import { conductorMetal } from './conductor-metal.ts';
import { conductorAreaMm2 } from './contradictions.ts';
import { type Circuit, levelAt } from './level-difference.ts';
import { predictedLegs } from './predicted-line.ts';
import { known, lacking, type Prediction } from './prediction.ts';

/** What a cable would lose in level, by its resistance alone, if one thing of it were otherwise. */
export interface Variant {
  readonly name: 'as it is' | 'twice the cross-section' | 'silver, same size';
  /** Of the loop, in ohms at 20 °C. */
  readonly ohms: number;
  /** Level at the load against a cable without resistance, in dB, at 1 kHz; at most 0. */
  readonly levelDb: number;
}

const oneKiloHertz = 1000;
const silver = conductorMetal({ material: 'silver' })?.percentIacs ?? Number.NaN;

/**
 * What doubling the cross-section saves, against what silver saves at the same size.
 *
 * The resistance alone is counted: R = rho / A of the loop, a coaxial cable's shield as it is; the level is that of the
 * divider of source, cable and load at 1 kHz.
 *
 * @example a copper loop of 0.1 ohm into 8 ohm: as it is -0.108 dB, twice the cross-section -0.054 dB, silver -0.099 dB
 */
export function savingsOf(construction: Construction, lengthMm: number, circuit: Circuit): Prediction<Variant[]> {
  const legs = predictedLegs(construction);
  const metal = conductorMetal(construction);
  if (!legs.isKnown) return legs;
  if (metal === undefined || conductorAreaMm2(construction) === undefined) return lacking('areaMm2');
  const { go, back } = legs.value;
  const isCoaxial = construction.geometry === 'coaxial';
  const loop = (factor: number) => (go * factor + back * (isCoaxial ? 1 : factor)) * (lengthMm / 1000);
  const variant = (name: Variant['name'], factor: number): Variant => {
    const ohms = loop(factor);
    return { name, ohms, levelDb: levelOf(ohms, circuit) - levelOf(0, circuit) };
  };
  return known([
    variant('as it is', 1),
    variant('twice the cross-section', 1 / 2),
    variant('silver, same size', metal.percentIacs / silver),
  ]);
}

function levelOf(ohms: number, circuit: Circuit): number {
  const constantsAt = () => ({ resistance: ohms, inductance: 0, conductance: 0, capacitance: 0 });
  return levelAt({ constantsAt, length: 1 }, circuit, oneKiloHertz);
}
