/** What can be measured of one piece of a cable. */
export const quantities = ['resistance', 'inductance', 'capacitance', 'impedance', 'level'] as const;
export type Quantity = (typeof quantities)[number];

/** A unit as people write it, with what one of it is in the quantity's own unit. */
export interface Unit {
  readonly name: string;
  readonly factor: number;
}

const ohms: readonly Unit[] = [
  { name: 'Ω', factor: 1 },
  { name: 'mΩ', factor: 1e-3 },
  { name: 'µΩ', factor: 1e-6 },
  { name: 'kΩ', factor: 1e3 },
];

/** The units of each quantity; the first is the one in which it is kept. */
export const unitsOf: Record<Quantity | 'frequency' | 'phase', readonly Unit[]> = {
  frequency: [
    { name: 'Hz', factor: 1 },
    { name: 'kHz', factor: 1e3 },
    { name: 'MHz', factor: 1e6 },
  ],
  resistance: ohms,
  impedance: ohms,
  inductance: [
    { name: 'H', factor: 1 },
    { name: 'mH', factor: 1e-3 },
    { name: 'µH', factor: 1e-6 },
    { name: 'nH', factor: 1e-9 },
  ],
  capacitance: [
    { name: 'F', factor: 1 },
    { name: 'µF', factor: 1e-6 },
    { name: 'nF', factor: 1e-9 },
    { name: 'pF', factor: 1e-12 },
  ],
  level: [{ name: 'dB', factor: 1 }],
  phase: [{ name: '°', factor: 1 }],
};

/** Spellings that mean the same unit: two signs for micro and for ohm, and the words. */
const plain = (unit: string) =>
  unit
    .normalize('NFKC')
    .replace(/\s+/g, '')
    .replace(/μ|^u(?=[ΩΩHF]|ohm)/iu, 'µ')
    .normalize('NFC')
    .replace(/ohms?$/i, 'Ω')
    .replace(/μ/g, 'µ')
    .replace(/deg(rees)?$/i, '°');

/**
 * The unit of a quantity that some writing means.
 *
 * @returns undefined when it is none of the quantity's
 * @example unitNamed('inductance', 'uH')?.factor // 1e-6
 */
export function unitNamed(quantity: Quantity | 'frequency' | 'phase', writing: string): Unit | undefined {
  const wanted = plain(writing);
  const known = unitsOf[quantity];
  // Milli and mega differ in their case alone, so the exact spelling goes first.
  return (
    known.find(({ name }) => plain(name) === wanted) ??
    known.find(({ name }) => plain(name).toLowerCase() === wanted.toLowerCase())
  );
}
