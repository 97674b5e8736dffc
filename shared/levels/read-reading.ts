import { type LevelUnit, perUnit } from './level-units.ts';

// One reading as somebody types it: "2.000", "2,000", "1998 mV", "-3.2 dBV".

const written = /^([+\-−]?)(\d*)(?:([.,])(\d*))?\s*([a-zµμ]*)$/i;

const voltPrefixes: Record<string, number> = { v: 1, mv: 1e-3, µv: 1e-6, μv: 1e-6, uv: 1e-6, kv: 1000 };
const decibels: Record<string, LevelUnit> = { dbv: 'dBV', dbu: 'dBu', db: 'dB' };

export type Reading = { readonly value: number } | { readonly fault: string };

/** The highest a load is driven to here: 200 V is 5 kW in 8 ohm. */
const mostVolts = 200;
const leastVolts = 0.0005;
const mostDb = 60;
const leastDb = -140;

const unitWords = (unit: LevelUnit) => (unit === 'V' ? 'volts' : unit);

/**
 * Reads one reading in the unit chosen for the table. A decimal comma is as good as a point; a unit may stand behind it.
 *
 * @returns a whole number as on the record (see `perUnit`), or in a sentence what is wrong with it
 */
export function readReading(text: string, unit: LevelUnit): Reading {
  const typed = text.trim();
  if (typed === '') return { fault: 'A reading is missing.' };
  const parts = written.exec(typed);
  const digits = `${parts?.[2] ?? ''}${parts?.[4] ?? ''}`;
  if (parts === null || digits === '')
    return { fault: `“${typed}” is not a number. Write one decimal sign, as in 2.000 or 2,000.` };
  const [, sign = '', whole = '', , decimals = '', suffix = ''] = parts;
  const value = Number(`${sign === '' || sign === '+' ? '' : '-'}${whole || '0'}.${decimals || '0'}`);
  const named = suffix.toLowerCase();
  if (named in decibels && decibels[named] !== unit)
    return { fault: `“${typed}” is in ${decibels[named]}, and this table is in ${unitWords(unit)}.` };
  if (named in voltPrefixes && unit !== 'V')
    return { fault: `“${typed}” is a voltage, and this table is in ${unitWords(unit)}.` };
  if (named !== '' && !(named in decibels) && !(named in voltPrefixes))
    return { fault: `The unit of “${typed}” is not known here. Write V, mV, dBV, dBu or dB.` };
  return unit === 'V' ? readVolts(typed, value * (voltPrefixes[named] ?? 1)) : readDecibels(typed, value, unit);
}

function readVolts(typed: string, volts: number): Reading {
  if (volts < 0)
    return { fault: `${typed} is below 0, which no voltage is. If these are decibels, choose dB as the unit.` };
  if (volts > mostVolts)
    return { fault: `${typed} is more than ${mostVolts} V. If the meter shows millivolts, write mV behind it.` };
  if (volts < leastVolts) return { fault: `${typed} is too little to measure: less than 0.5 mV.` };
  return { value: Math.round(volts * perUnit('V')) };
}

function readDecibels(typed: string, db: number, unit: LevelUnit): Reading {
  if (db > mostDb || db < leastDb)
    return {
      fault: `${typed} is no level in ${unit} that a load can have. If these are volts, choose V as the unit.`,
    };
  return { value: Math.round(db * perUnit(unit)) + 0 };
}
