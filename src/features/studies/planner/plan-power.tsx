import type { Plan } from './plan-of.ts';
import { PowerTable } from './power-table.tsx';

/** The chance of finding what is there: exact, for answers that each have a draw of their own. */
export function PlanPower({ plan }: { plan: Plan }) {
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
