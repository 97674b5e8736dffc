export type CourseTrial = { number: number; state: 'locked' | 'void' | 'open' | 'now' };

/**
 * How far the line is drawn in jacket: the index of the trial that is on, or of the last one that is over; past the
 * end when none is left.
 */
export function reachedIndex(trials: readonly CourseTrial[]): number {
  const now = trials.findIndex((trial) => trial.state === 'now');
  if (now >= 0) return now;
  return trials.some((trial) => trial.state === 'open')
    ? trials.findLastIndex((trial) => trial.state !== 'open')
    : trials.length;
}

/** The course in words: "Trial 7 of 16; 6 locked, 1 void". */
export function describeCourse(trials: readonly CourseTrial[]): string {
  const now = trials.find((trial) => trial.state === 'now');
  const count = (state: CourseTrial['state']) => trials.filter((trial) => trial.state === state).length;
  const voids = count('void');
  const where = now
    ? `Trial ${now.number} of ${trials.length}`
    : `${trials.length} ${trials.length === 1 ? 'trial' : 'trials'}`;
  return `${where}; ${count('locked')} locked${voids > 0 ? `, ${voids} void` : ''}`;
}
