import { useRef } from 'react';
import { formatCount, formatNumber } from '../../../lib/format.ts';
import { Progress } from '../../../ui/progress.tsx';
import type { GroupPowerSoFar } from './group-power-worker.ts';
import { usePlan } from './plan-context.ts';
import { type Plan, rateOf } from './plan-of.ts';
import { powerPercent } from './plan-words.ts';
import { PowerTable } from './power-table.tsx';
import { TakeSittings } from './take-sittings.tsx';
import { simulatedShare } from './use-group-simulation.ts';

/** What a group finds, simulated by the registered test: there is no formula for it. */
export function GroupPower({ plan }: { plan: Plan }) {
  const { aim, simulated } = usePlan();
  const title = useRef<HTMLHeadingElement>(null);
  const rates = [rateOf(plan.method, aim.share), ...plan.method.planned.rates];
  const isDone = simulated !== null && simulated.needed !== undefined;
  return (
    <section className="flex flex-col gap-3" aria-busy={!isDone}>
      <h3 ref={title} tabIndex={-1} className="text-lg">
        How many trials it takes
      </h3>
      {simulated === null ? (
        <p className="text-soft">Simulating the registered test …</p>
      ) : (
        <>
          <p>{neededWords(simulated, plan, aim.goal, rates[0] ?? 0)}</p>
          <TakeSittings
            planned={plan.trials}
            needed={simulated.needed ?? null}
            sessions={plan.sessions}
            does={`The ${formatNumber(plan.trials)} planned find it in ${powerPercent(simulatedShare(simulated.found[0] ?? 0, simulated.done))} of studies`}
            isCurrent={isDone}
            onTaken={() => title.current?.focus()}
          />
          <PowerTable
            power={rates.map((rate, index) => ({
              rate,
              power: simulatedShare(simulated.found[index] ?? 0, simulated.done),
            }))}
            words={plan.method.plan}
          />
        </>
      )}
      {simulated === null || simulated.done === simulated.of ? null : (
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

function neededWords({ needed }: GroupPowerSoFar, { listeners, method }: Plan, goal: number, rate: number): string {
  const at = `${method.plan.atRate(rate)} in ${powerPercent(goal)} of studies`;
  if (needed === undefined) return `Looking for the number of trials that find ${at} …`;
  if (needed === null) return `No number of trials that was tried finds ${at}.`;
  return `About ${formatCount(needed, 'trial')}, each heard by ${listeners}, find ${at}: a simulated number, so plan a few more.`;
}
