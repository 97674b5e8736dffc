import { percentOf } from '#shared/findings/portrait-words.ts';
import type { Portrait } from '#shared/methods/portrait.ts';
import { IntervalChart } from '../../ui/interval-chart.tsx';

type ListenerIntervalsProps = Pick<Portrait['listeners'], 'chart'>;

/** Rates side by side, with their intervals and the line of what comes of nothing. */
export function ListenerIntervals({ chart }: ListenerIntervalsProps) {
  const { caption, quantity, middle, rows } = chart;
  return (
    <IntervalChart
      caption={caption}
      rowName="Listener"
      rows={rows}
      middle={middle}
      quantity={quantity}
      domain={[0, 1]}
      format={percentOf}
    />
  );
}
