import type { LevelHandling, RegisteredLevels } from './registered-levels.ts';

/** A difference in words, never smaller than it was measured: "0.12 dB". */
export const dbText = (milliDb: number): string => `${(Math.ceil(Math.abs(milliDb) / 10) / 100).toFixed(2)} dB`;

/** A level or a signed difference to the thousandth, as in a table. */
export const exactDbText = (milliDb: number): string =>
  `${milliDb < 0 ? '−' : ''}${(Math.abs(milliDb) / 1000).toFixed(3)}`;

/** "1 kHz", "3.15 kHz", "315 Hz". */
export const hertzText = (hz: number): string => (hz >= 1000 ? `${hz / 1000} kHz` : `${hz} Hz`);

export const handlingWords: Record<LevelHandling, string> = {
  'as-supplied': 'as supplied',
  'level-compensated': 'level-compensated',
};

/** What a protocol registers of levels, in a line. */
export function registeredLevelsText(levels: RegisteredLevels | undefined): string {
  if (levels === undefined) return 'not measured';
  const { handling, toleranceMilliDb, frequenciesHz } = levels;
  return `${handlingWords[handling]}, tolerance ${toleranceMilliDb / 1000} dB, measured at ${frequenciesHz.map(hertzText).join(', ')}`;
}
