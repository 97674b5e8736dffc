import type { RegisteredResult } from '#shared/findings/registered-result.ts';
import { IntervalChart } from '../../ui/interval-chart.tsx';

/** Rates of right answers side by side, with their intervals and the line of guessing. */
export function ListenerIntervals({ byListener, chance }: Pick<RegisteredResult, 'byListener' | 'chance'>) {
  return (
    <IntervalChart
      caption="Rate of right answers by listener, with 95 % Clopper-Pearson intervals"
      rowName="Listener"
      rows={byListener.map(({ listener, correct, answers, interval }) => ({
        label: listener,
        value: answers === 0 ? 0 : correct / answers,
        low: Number(interval.lower),
        high: Number(interval.upper),
      }))}
      guessing={chance.numerator / chance.denominator}
      quantity="Right answers"
      domain={[0, 1]}
      format={(share) => `${Math.round(share * 100)} %`}
    />
  );
}
