import type { Circuit } from '#shared/cables/level-difference.ts';
import type { Cable } from '#shared/contracts/cables.ts';
import { readLoad } from '#shared/measurements/read-load.ts';

/** Between what the cables stand, as it is typed. */
export type CircuitValues = {
  sourceOhms: string;
  loadType: 'resistance' | 'curve';
  loadOhms: string;
  /** Frequency, impedance and phase, line by line. */
  curve: string;
};

/** What such cables usually stand between. Common practice, no source. */
const usual: Record<Cable['kind'], { sourceOhms: string; loadOhms: string }> = {
  loudspeaker: { sourceOhms: '0.05', loadOhms: '8' },
  headphone: { sourceOhms: '1', loadOhms: '32' },
  interconnect: { sourceOhms: '100', loadOhms: '10000' },
  check: { sourceOhms: '0.05', loadOhms: '8' },
  other: { sourceOhms: '0', loadOhms: '8' },
};

export const usualCircuit = (kind: Cable['kind']): CircuitValues => ({
  ...usual[kind],
  loadType: 'resistance',
  curve: '',
});

const between = (typed: string, least: number, most: number) => {
  const value = Number(typed.replace(',', '.'));
  return typed.trim() !== '' && value >= least && value <= most ? value : null;
};

export type ReadCircuit =
  | { readonly circuit: Circuit; readonly faults: null }
  | { readonly circuit: null; readonly faults: { source?: string; load?: string; curve?: string } };

/** The circuit, or what is wrong with what is typed. */
export function readCircuit({ sourceOhms, loadType, loadOhms, curve }: CircuitValues): ReadCircuit {
  const source = between(sourceOhms, 0, 1e6);
  if (source === null) return { circuit: null, faults: { source: 'From 0 Ω to 1 MΩ' } };
  if (loadType === 'resistance') {
    const resistance = between(loadOhms, 0.1, 1e6);
    return resistance === null
      ? { circuit: null, faults: { load: 'From 0.1 Ω to 1 MΩ' } }
      : { circuit: { sourceOhms: source, load: { type: 'resistor', resistance } }, faults: null };
  }
  if (curve.trim() === '') return { circuit: null, faults: {} };
  const { points, faults } = readLoad(curve);
  const [fault] = faults;
  return fault === undefined
    ? { circuit: { sourceOhms: source, load: { type: 'curve', points } }, faults: null }
    : { circuit: null, faults: { curve: `Line ${fault.line}: ${fault.detail}` } };
}
