import { atMost, hertz, leftWhenMatched } from '#shared/cables/difference-words.ts';
import type { LevelDifference } from '#shared/cables/level-difference.ts';
import { levelJudgement, noticeableLevels } from '#shared/cables/level-judgement.ts';
import { evenChance } from '#shared/statistics/chance.ts';
import { similarityPlan } from '#shared/statistics/planned-margin.ts';
import { formatNumber } from '../../lib/format.ts';
import type { PairDifference } from './pair.ts';

const marginPercent = 20;

/** The difference in words, against what listeners are known to notice, and what follows for planning. */
export function PairPlanning({ predicted, measured }: PairDifference) {
  const counted = measured ?? predicted;
  if (counted === null) return null;
  const { word, compared, plan } = levelJudgement(counted.largestAudible.decibels);
  const needed = word === 'small' || word === 'hardly anything' ? similarityPlan(evenChance).needed(0.2).nSafe : null;
  return (
    <div className="flex max-w-3xl flex-col gap-3">
      {predicted === null ? null : <p className="text-lg">{largestWords('By their construction', predicted)}</p>}
      {measured === null ? null : <p className="text-lg">{largestWords('As measured', measured)}</p>}
      <p>
        {compared} {plan}
        {needed === null
          ? ''
          : ` To show that at most ${marginPercent} % hear it, asked one listener at a time with two answers, takes some ${formatNumber(needed)} trials for a chance of 90 %.`}
      </p>
      <details>
        <summary className="inline-flex min-h-8 cursor-pointer items-center rounded underline underline-offset-4 hover:decoration-2">
          What listeners just notice, and how this is worked out
        </summary>
        <ul className="list-disc pl-5">
          {noticeableLevels.map(({ what, decibels: level, source }) => (
            <li key={what}>
              {what}: about {level} dB. <span className="text-soft">{source}.</span>
            </li>
          ))}
          <li>
            0.1 dB passes as matched, 0.01 dB is next to nothing.{' '}
            <span className="text-soft">Common practice, no source.</span>
          </li>
          <li>
            Level at the load: 20 lg |1 / (a + b Yₗ + Zₛ (c + d Yₗ))|, each cable a line of distributed constants.{' '}
            <span className="text-soft">Pozar, Microwave Engineering, 4th ed. (2012), section 4.4.</span>
          </li>
          <li>
            Trials: exact binomial, one-sided 95 %, nobody hearing anything.{' '}
            <span className="text-soft">As in the planner.</span>
          </li>
        </ul>
      </details>
    </div>
  );
}

function largestWords(from: string, difference: LevelDifference): string {
  const { decibels: level, frequency } = difference.largestAudible;
  return `${from} they differ by ${atMost(level)} between 20 Hz and 20 kHz, at ${hertz(frequency)}; matched in level at 1 kHz, by ${atMost(leftWhenMatched(difference.curve))}.`;
}
