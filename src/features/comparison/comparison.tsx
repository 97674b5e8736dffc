import { useMemo } from 'react';
import type { Circuit } from '#shared/cables/level-difference.ts';
import { FrequencyChart, type FrequencySeries } from '../../ui/frequency-chart.tsx';
import { Notice } from '../../ui/notice.tsx';
import { MeasuredPair } from './measured-pair.tsx';
import { type PairDifference, type PairSide, pairDifference } from './pair.ts';
import { PairPlanning } from './pair-planning.tsx';
import { Savings } from './savings.tsx';

type ComparisonProps = { first: PairSide; second: PairSide; circuit: Circuit };

/** Two cables in one circuit: where they differ and by how much, as predicted and as measured. */
export function Comparison({ first, second, circuit }: ComparisonProps) {
  const difference = useMemo(() => pairDifference(first, second, circuit), [first, second, circuit]);
  const series = seriesOf(difference);
  return (
    <div className="flex flex-col gap-10">
      <section aria-labelledby="difference" className="flex flex-col gap-5">
        <h2 id="difference" className="text-xl">
          How they differ
        </h2>
        {series.length === 0 ? (
          <Notice title="Too little is known.">
            Describe the construction of both cables, or measure the resistance of a piece of each.
          </Notice>
        ) : (
          <>
            <PairPlanning {...difference} />
            <FrequencyChart
              caption={`Level of ${first.cable.name} over ${second.cable.name} at the load`}
              quantity={`Level of ${first.cable.name} over ${second.cable.name}, dB`}
              series={series}
              format={(value) => Number(value.toFixed(4)).toString().replace('-', '−')}
            />
          </>
        )}
        <MeasuredPair first={first} second={second} />
      </section>
      <section aria-labelledby="savings" className="flex flex-col gap-5">
        <h2 id="savings" className="text-xl">
          What more metal saves, and what silver saves
        </h2>
        <div className="grid gap-x-12 gap-y-8 lg:grid-cols-2">
          <Savings cable={first.cable} circuit={circuit} />
          <Savings cable={second.cable} circuit={circuit} />
        </div>
      </section>
    </div>
  );
}

function seriesOf({ predicted, measured }: PairDifference): FrequencySeries[] {
  const series = (name: string, isWorkedOut: boolean, difference: PairDifference['predicted']) =>
    difference === null
      ? []
      : [
          {
            name,
            isWorkedOut,
            points: difference.curve.map(({ frequency, decibels }) => ({ frequency, value: decibels })),
          },
        ];
  return [...series('From measurements', false, measured), ...series('From construction', true, predicted)];
}
