import { formatCount, formatNumber } from '../../../lib/format.ts';
import { Progress } from '../../../ui/progress.tsx';
import { usePlan } from './plan-context.ts';
import { type Plan, rateOf } from './plan-of.ts';
import { PowerTable } from './power-table.tsx';
import { simulatedShare } from './use-group-simulation.ts';

/** What a group finds, simulated by the registered test: there is no formula for it. */
export function GroupPower({ plan }: { plan: Plan }) {
  const { aim, simulated } = usePlan();
  const rates = [rateOf(plan.method, aim.share), ...plan.method.planned.rates];
  const isDone = simulated !== null && simulated.done === simulated.of;
  return (
    <section className="flex flex-col gap-3" aria-busy={!isDone}>
      <h3 className="text-lg">The chance of finding it</h3>
      {simulated === null ? (
        <p className="text-soft">Simulating the registered test …</p>
      ) : (
        <PowerTable
          power={rates.map((rate, index) => ({
            rate,
            power: simulatedShare(simulated.found[index] ?? 0, simulated.done),
          }))}
          words={plan.method.plan}
        />
      )}
      {simulated === null || isDone ? null : (
        <Progress
          label="Simulated studies"
          value={simulated.done}
          max={simulated.of}
          valueText={`${formatNumber(simulated.done)} of ${formatNumber(simulated.of)}`}
        />
      )}
      <p className="text-soft">
        {formatCount(plan.listeners, 'listener')} who answer each on their own, as often as the column says;{' '}
        {formatNumber(simulated?.of ?? 2_000)} studies simulated with a fixed seed, good to two percentage points.
        Habits that they share take from it.
      </p>
    </section>
  );
}
