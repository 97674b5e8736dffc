import type { MeasurementDraft } from '#shared/contracts/measurements.ts';
import type { Quantity } from '#shared/measurements/quantities.ts';
import { withUnit } from '../../lib/format.ts';

export const quantityWords: Record<Quantity, string> = {
  resistance: 'Resistance',
  inductance: 'Inductance',
  capacitance: 'Capacitance',
  impedance: 'Impedance',
  level: 'Level at the load',
};

/** How a piece is connected, so that what is measured can stand beside what is predicted. */
export const quantityHints: Record<Quantity, string> = {
  resistance: 'Of the loop: measured at one end, the far end shorted.',
  inductance: 'Of the loop: measured at one end, the far end shorted.',
  capacitance: 'Between the conductors: measured at one end, the far end open.',
  impedance: 'Magnitude, of the loop: measured at one end, the far end shorted.',
  level: 'In dB against the source without a load, or against any fixed level.',
};

export const momentWords: Record<MeasurementDraft['moment'], string> = {
  'as-is': 'As it is',
  before: 'Before a treatment',
  after: 'After a treatment',
};

/** The unit in which a quantity of a cable is said: ohms of a run are milliohms. */
const shown: Record<Quantity, { unit: string; factor: number }> = {
  resistance: { unit: 'mΩ', factor: 1e3 },
  inductance: { unit: 'µH', factor: 1e6 },
  capacitance: { unit: 'pF', factor: 1e12 },
  impedance: { unit: 'mΩ', factor: 1e3 },
  level: { unit: 'dB', factor: 1 },
};

/** "41.3": in the unit that `quantityUnit` names. */
export function figureOf(quantity: Quantity, value: number): string {
  const scaled = value * shown[quantity].factor;
  if (quantity === 'level') return scaled.toFixed(3);
  return Number(scaled.toPrecision(4)).toLocaleString('en', { maximumSignificantDigits: 4 });
}

export const quantityUnit = (quantity: Quantity): string => shown[quantity].unit;

export const figureWithUnit = (quantity: Quantity, value: number): string =>
  withUnit(figureOf(quantity, value), quantityUnit(quantity));
