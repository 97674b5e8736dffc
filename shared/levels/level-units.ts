/** How a level is read off an instrument. `dB` is relative to a reference that stays the same for one session. */
export const levelUnits = ['V', 'dBV', 'dBu', 'dB'] as const;
export type LevelUnit = (typeof levelUnits)[number];

/** 0 dBu is the root of 0.6 V, the voltage of 1 mW in 600 ohm (IEC 60268-2). */
const dBuInDbV = 10 * Math.log10(0.6);

/** Readings stand on the record as whole numbers: millionths of a volt, or thousandths of a decibel. */
export const perUnit = (unit: LevelUnit): number => (unit === 'V' ? 1_000_000 : 1000);

/**
 * A voltage in decibels relative to 1 V.
 *
 * @param volts above 0
 * @throws RangeError for anything else: no level belongs to no voltage
 * @example dbVOfVolts(2) // 6.0206
 */
export function dbVOfVolts(volts: number): number {
  if (!(volts > 0) || !Number.isFinite(volts)) throw new RangeError('a level belongs to a voltage above 0');
  return 20 * Math.log10(volts);
}

/** The voltage of a level in decibels relative to 1 V; the inverse of `dbVOfVolts`. */
export const voltsOfDbV = (dbV: number): number => 10 ** (dbV / 20);

/** From dBu to dBV: 2.218 dB less. */
export const dbVOfDbu = (dbU: number): number => dbU + dBuInDbV;

/** From dBV to dBu; the inverse of `dbVOfDbu`. */
export const dbuOfDbV = (dbV: number): number => dbV - dBuInDbV;

/**
 * The level that repeated readings come to, in thousandths of a decibel: relative to 1 V, or to the session's reference.
 * Voltages are averaged as voltages, decibels as decibels.
 *
 * @param readings at least one, as on the record (see `perUnit`); voltages above 0
 * @returns a whole number
 * @throws RangeError without a reading, or for a voltage that is not above 0
 */
export function levelMilliDb(readings: readonly number[], unit: LevelUnit): number {
  if (readings.length === 0) throw new RangeError('no reading, no level');
  const mean = readings.reduce((sum, reading) => sum + reading, 0) / readings.length / perUnit(unit);
  const db = unit === 'V' ? dbVOfVolts(mean) : unit === 'dBu' ? dbVOfDbu(mean) : mean;
  // Rounding just below 0 gives −0, which is no whole number of a record.
  return Math.round(db * 1000) + 0;
}
