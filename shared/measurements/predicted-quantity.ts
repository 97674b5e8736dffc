import { levelAt } from '#shared/cables/level-difference.ts';
import { predictedSkinEffect } from '#shared/cables/predicted-conductor.ts';
import {
  predictedCapacitance,
  predictedInductance,
  predictedLegs,
  predictedLine,
} from '#shared/cables/predicted-line.ts';
import { known, lacking, type Prediction } from '#shared/cables/prediction.ts';
import type { Construction } from '#shared/contracts/construction.ts';
import type { Quantity } from './quantities.ts';

/** A quantity of a whole piece over frequency in Hz; 0 is direct current. */
export type OverFrequency = (frequency: number) => number;

/** Between what a cable stood when the level at the load was measured. */
export interface MeasuredCircuit {
  readonly sourceOhms: number;
  readonly loadOhms: number;
}

/**
 * What a construction lets expect of a measurement of the whole piece at 20 °C: resistance, inductance and impedance of the
 * loop with its far end shorted, capacitance with it open, and the level at the load against the source's e.m.f. in dB.
 *
 * The impedance is √(R² + (ωL)²): the loop as one lump, which holds while the piece is short against the wavelength.
 *
 * @param circuit for a level; without one there is no prediction
 * @example predictedQuantity('resistance', { material: 'copper', areaMm2: 2.5, ... }, 5000) // 0.06897 ohm at 0 Hz
 */
export function predictedQuantity(
  quantity: Quantity,
  construction: Construction,
  lengthMm: number,
  circuit: MeasuredCircuit | null = null,
): Prediction<OverFrequency> {
  const metres = lengthMm / 1000;
  if (quantity === 'capacitance') {
    const capacitance = predictedCapacitance(construction);
    return capacitance.isKnown ? known(() => capacitance.value * metres) : capacitance;
  }
  if (quantity === 'level') return predictedLevel(construction, lengthMm, circuit);
  const resistance = predictedResistance(construction);
  if (quantity === 'resistance')
    return resistance.isKnown ? known((frequency) => resistance.value(frequency) * metres) : resistance;
  const inductance = predictedInductance(construction, 0);
  if (!inductance.isKnown) return inductance;
  const inductanceAt = (frequency: number) => knownValue(predictedInductance(construction, frequency)) * metres;
  if (quantity === 'inductance') return known(inductanceAt);
  if (!resistance.isKnown) return resistance;
  return known((frequency) =>
    Math.hypot(resistance.value(frequency) * metres, 2 * Math.PI * frequency * inductanceAt(frequency)),
  );
}

function knownValue<Value>(prediction: Prediction<Value>): Value {
  if (!prediction.isKnown) throw new Error('known at one frequency and not at another');
  return prediction.value;
}

/** Per metre of cable; a shield's resistance is taken as that to direct current. */
function predictedResistance(construction: Construction): Prediction<OverFrequency> {
  const legs = predictedLegs(construction);
  if (!legs.isKnown) return legs;
  const skin = predictedSkinEffect(construction, 1000);
  if (!skin.isKnown) return skin;
  const { go, back } = legs.value;
  const isCoaxial = construction.geometry === 'coaxial';
  return known((frequency) => {
    const { resistanceRatio } = knownValue(predictedSkinEffect(construction, frequency));
    return go * resistanceRatio + back * (isCoaxial ? 1 : resistanceRatio);
  });
}

function predictedLevel(
  construction: Construction,
  lengthMm: number,
  circuit: MeasuredCircuit | null,
): Prediction<OverFrequency> {
  if (circuit === null) return lacking();
  const line = predictedLine(construction, lengthMm);
  if (!line.isKnown) return line;
  const { sourceOhms, loadOhms } = circuit;
  const between = { sourceOhms, load: { type: 'resistor' as const, resistance: loadOhms } };
  return known((frequency) => levelAt(line.value, between, frequency));
}
