import type { RegisteredResult } from '#shared/methods/methods.ts';
import type { Portrait } from '#shared/methods/portrait.ts';
import { IntervalChart } from '../../ui/interval-chart.tsx';

type ListenerIntervalsProps = Pick<RegisteredResult, 'chance'> & Pick<Portrait['listeners'], 'chart'>;

/** Rates side by side, with their intervals and the line of what comes of nothing. */
export function ListenerIntervals({ chart, chance }: ListenerIntervalsProps) {
  const { caption, quantity, middle, rows } = chart;
  return (
    <IntervalChart
      caption={caption}
      rowName="Listener"
      rows={rows}
      middle={{ value: chance.numerator / chance.denominator, words: middle }}
      quantity={quantity}
      domain={[0, 1]}
      format={(share) => `${Math.round(share * 100)} %`}
    />
  );
}
