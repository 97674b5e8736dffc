import { formatCount, formatNumber } from '../../../lib/format.ts';
import { Progress } from '../../../ui/progress.tsx';
import type { Plan } from './plan-of.ts';
import { PowerTable } from './power-table.tsx';
import { useGroupPower } from './use-group-power.ts';

/** What a group finds, simulated by the registered test: there is no formula for it. */
export function GroupPower({ plan }: { plan: Plan }) {
  const rates = plan.figures.power.map(({ rate }) => rate);
  const soFar = useGroupPower({
    listeners: plan.listeners,
    trials: plan.trials,
    labels: plan.method.planned.labels,
    alpha: plan.alpha,
    alternative: plan.alternative,
    rates,
  });
  const power = rates.map((rate, index) => ({
    rate,
    // Half a study either way: a simulation promises neither all nor nothing.
    power: soFar === null ? 0 : ((soFar.found[index] ?? 0) + 0.5) / (soFar.done + 1),
  }));
  const isDone = soFar !== null && soFar.done === soFar.of;
  return (
    <section className="flex flex-col gap-3" aria-busy={!isDone}>
      <h3 className="text-lg">The chance of finding it</h3>
      {soFar === null ? (
        <p className="text-soft">Simulating the registered test …</p>
      ) : (
        <PowerTable power={power} words={plan.method.plan} />
      )}
      {soFar === null || isDone ? null : (
        <Progress
          label="Simulated studies"
          value={soFar.done}
          max={soFar.of}
          valueText={`${formatNumber(soFar.done)} of ${formatNumber(soFar.of)}`}
        />
      )}
      <p className="text-soft">
        {formatCount(plan.listeners, 'listener')} who answer each on their own, as often as the column says;{' '}
        {formatNumber(soFar?.of ?? 2_000)} studies simulated with a fixed seed, good to two percentage points. Habits
        that they share take from it.
      </p>
    </section>
  );
}
