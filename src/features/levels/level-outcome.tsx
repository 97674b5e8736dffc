import {
  balancesOf,
  driftOf,
  gainDifference,
  greatestDifference,
  levelsOf,
  responsesOf,
} from '#shared/levels/compare-levels.ts';
import { dbText, exactDbText, hertzText } from '#shared/levels/level-words.ts';
import type { MeasuredLevels } from '#shared/levels/measured-levels.ts';
import { driftMilliDb, gradeOf, type LevelGrade, type RegisteredLevels } from '#shared/levels/registered-levels.ts';
import { type Fact, Facts } from '../../ui/facts.tsx';

const gradeWords: Record<LevelGrade, string> = {
  target: 'within the target of 0.05 dB',
  pass: 'within the tolerance',
  warn: 'out of tolerance',
  fail: 'beyond 0.2 dB',
};

type LevelOutcomeProps = {
  title: string;
  measured: MeasuredLevels | null;
  /** The measurement before the session, to see what has moved since. */
  first: MeasuredLevels | null;
  registered: RegisteredLevels;
};

/** What the readings come to: how far the codes are apart, and whether a level has moved. */
export function LevelOutcome({ title, measured, first, registered }: LevelOutcomeProps) {
  const levels = measured === null ? [] : levelsOf(measured);
  const difference = gainDifference(levels);
  if (difference === null)
    return (
      <Facts
        title={title}
        facts={[{ label: 'Difference at 1 kHz', value: 'once two codes are read', isWords: true }]}
      />
    );
  const grade = gradeOf(difference.milliDb, registered);
  const drift = first === null ? null : driftOf(levelsOf(first), levels);
  const response = greatestDifference(responsesOf(levels));
  const [louder, quieter] = difference.codes;
  const facts: Fact[] = [
    {
      label: 'Largest difference at 1 kHz',
      value: dbText(difference.milliDb),
      tone: grade === 'target' || grade === 'pass' ? 'held' : 'amber',
    },
    { label: 'That is', value: gradeWords[grade], isWords: true },
    ...(difference.milliDb === 0
      ? []
      : [{ label: 'Where', value: `${difference.channel}: ${louder} above ${quieter}`, isWords: true }]),
    ...balancesOf(levels).map(({ code, milliDb }) => ({
      label: `Left above right, ${code}`,
      value: `${exactDbText(milliDb)} dB`,
    })),
    ...(response === null
      ? []
      : [
          {
            label: 'Response, relative to 1 kHz',
            value: `${dbText(response.milliDb)} at ${hertzText(response.frequencyHz)}`,
          },
        ]),
    ...(drift === null
      ? []
      : [
          {
            label: 'Moved since the start',
            value: dbText(drift),
            tone: drift > driftMilliDb ? ('amber' as const) : ('held' as const),
          },
        ]),
  ];
  return (
    <div aria-live="polite">
      <Facts title={title} facts={facts} />
    </div>
  );
}
