import { type StatementRule, saidOf } from './statement-rule.ts';

const outside =
  /\b(\d+([.,]\d+)?\s?(MHz|GHz)|characteristic impedance|velocity (factor|of propagation)|signal speed|time smear\w*|propagation delay|reflections?)\b/i;
const speedOfLight = 299_792_458;
const highest = 20_000;

export const beyondTheBand: StatementRule = {
  id: 'beyond-the-band',
  title: 'Effects of long lines',
  field: 'description',
  look: (cable) => {
    const word = saidOf(cable, outside);
    if (word === null) return null;
    const permittivity = cable.construction.permittivity ?? 4;
    const metres = cable.lengthMm / 1000;
    const wavelength = speedOfLight / Math.sqrt(permittivity) / highest;
    const delay = (metres * Math.sqrt(permittivity)) / speedOfLight;
    return `“${word}” is stated. A wave of 20 kHz is ${(wavelength / 1000).toFixed(1)} km long in this cable and crosses its ${metres.toLocaleString('en', { maximumFractionDigits: 2 })} m in ${(delay * 1e9).toFixed(0)} ns.`;
  },
  reason:
    'Reflections and travelling waves matter where a cable is long against the wavelength. Short of a tenth of it a cable is a resistance, an inductance and a capacitance, and these are worked out on this page.',
  source: 'Pozar, Microwave Engineering, 4th ed. (2012), chapter 2; the tenth is common practice, no source',
};
