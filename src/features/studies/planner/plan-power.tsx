import { GroupPower } from './group-power.tsx';
import type { Plan } from './plan-of.ts';
import { PowerTable } from './power-table.tsx';

/** The chance of finding what is there: exact for answers that each have a draw of their own, simulated for a group. */
export function PlanPower({ plan }: { plan: Plan }) {
  const { chance } = plan.method.planned;
  if (plan.listeners > 1 && chance !== null) return <GroupPower plan={plan} chance={chance} />;
  const isShared = plan.listeners > 1;
  return (
    <section className="flex flex-col gap-3">
      <h3 className="text-lg">{isShared ? 'One listener alone on these trials' : 'The chance of finding it'}</h3>
      {isShared ? (
        <p className="text-soft">
          If all listeners answer alike, the group is worth no more than this. Unlike listeners add to it, by how much
          nobody knows beforehand.
        </p>
      ) : null}
      <PowerTable power={plan.figures.power} words={plan.method.plan} />
    </section>
  );
}
