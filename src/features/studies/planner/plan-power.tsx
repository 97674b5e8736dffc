import { GroupPower } from './group-power.tsx';
import type { Plan } from './plan-of.ts';
import { PowerTable } from './power-table.tsx';

/** The chance of finding what is there: exact for answers that each have a draw of their own, simulated for a group. */
export function PlanPower({ plan }: { plan: Plan }) {
  if (plan.listeners > 1) return <GroupPower plan={plan} />;
  return (
    <section className="flex flex-col gap-3">
      <h3 className="text-lg">The chance of finding it</h3>
      <PowerTable power={plan.figures.power} words={plan.method.plan} />
    </section>
  );
}
