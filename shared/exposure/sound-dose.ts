// How much sound is how much: of the week by WHO and ITU, of the day by NIOSH.

/** A stay at one level. */
export type Stay = {
  /** A-weighted level in tenths of a decibel. */
  readonly tenthsDba: number;
  readonly minutes: number;
};

/** The reference pressure of sound level, squared: (20 µPa)². */
const referencePa2 = 4e-10;
/** The weekly allowances of WHO/ITU-T H.870: 80 dBA for 40 h, which is 1.6 Pa²h, and 75 dBA for sensitive users. */
const weekly = { adults: { dba: 80, hours: 40 }, sensitive: { dba: 75, hours: 40 } } as const;
/** NIOSH's recommended limit: 85 dBA for 8 h, half the time for every 3 dB more. */
const daily = { dba: 85, hours: 8, exchangeDb: 3 } as const;

export type Listeners = keyof typeof weekly;

/**
 * The sound dose of a stay.
 *
 * @param tenthsDba A-weighted level in tenths of a decibel, at least 0
 * @param minutes   at least 0
 * @returns Pa²h
 * @throws RangeError outside these
 * @example soundDose({ tenthsDba: 800, minutes: 2400 }) // 1.6
 * @see WHO and ITU, Safe listening devices and systems (ITU-T H.870)
 */
export function soundDose({ tenthsDba, minutes }: Stay): number {
  if (!(tenthsDba >= 0 && minutes >= 0)) throw new RangeError('level and time are not below 0');
  return (referencePa2 * 10 ** (tenthsDba / 100) * minutes) / 60;
}

/**
 * The share of the weekly allowance that some stays use, 1 for all of it.
 *
 * @example shareOfWeek([{ tenthsDba: 830, minutes: 90 }], 'adults') // 0.0748
 */
export function shareOfWeek(stays: readonly Stay[], listeners: Listeners): number {
  const { dba, hours } = weekly[listeners];
  const allowed = soundDose({ tenthsDba: dba * 10, minutes: hours * 60 });
  return stays.reduce((sum, stay) => sum + soundDose(stay), 0) / allowed;
}

/**
 * The share of a day that NIOSH allows which some stays use, 1 for all of it.
 *
 * @example shareOfDay([{ tenthsDba: 880, minutes: 240 }]) // 1
 * @see NIOSH, Criteria for a recommended standard: occupational noise exposure (publication 98-126, 1998)
 */
export function shareOfDay(stays: readonly Stay[]): number {
  return stays.reduce((sum, { tenthsDba, minutes }) => {
    if (!(tenthsDba >= 0 && minutes >= 0)) throw new RangeError('level and time are not below 0');
    const allowedMinutes = (daily.hours * 60) / 2 ** ((tenthsDba / 10 - daily.dba) / daily.exchangeDb);
    return sum + minutes / allowedMinutes;
  }, 0);
}

/** A share in per cent, never smaller than it is: "7.5 %". */
export function shareText(share: number): string {
  const tenths = Math.ceil(Number((share * 1000).toPrecision(6)));
  return `${(tenths / 10).toFixed(1)} %`;
}
