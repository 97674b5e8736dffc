import { aboveGuessingRate } from '#shared/statistics/above-guessing.ts';
import { formatCount } from '../../../lib/format.ts';
import { usePlan } from './plan-context.ts';
import type { Plan } from './plan-of.ts';
import { detectablePower } from './plan-search.ts';
import { percent, powerPercent } from './plan-words.ts';

/** What this plan would allow to be said if the study finds nothing. */
export function PlanNull({ plan }: { plan: Plan }) {
  const { margin, plan: words } = plan.method;
  return (
    <section className="flex flex-col gap-3">
      <h3 className="text-lg">If nothing is found</h3>
      {plan.listeners > 1 ? <OfGroup plan={plan} /> : <OfOwnDraws plan={plan} />}
      {margin !== null && plan.choices.marginPercent !== undefined ? null : (
        <p>
          {words.notShown}{' '}
          {margin === null
            ? `${plan.method.name} has no margin to register, so that it can only look for a difference.`
            : 'To be able to show that there is next to nothing, register a margin.'}
        </p>
      )}
    </section>
  );
}

function OfOwnDraws({ plan }: { plan: Plan }) {
  const { found, isCurrent } = usePlan();
  const words = plan.method.plan;
  const rate = isCurrent ? found?.own?.detectable : undefined;
  return (
    <p>
      {words.leftOpen(plan.trials, plan.alpha)}
      {rate == null
        ? null
        : ` It could have found ${words.couldFind(rate)}, with ${powerPercent(detectablePower)} power: so often a study of ${formatCount(plan.trials, 'trial')} finds that.`}
    </p>
  );
}

/** What a group leaves open depends on how much its trials differ; half of the simulated studies tell how much at least. */
function OfGroup({ plan }: { plan: Plan }) {
  const { simulated } = usePlan();
  const { planned, margin } = plan.method;
  if (margin?.counts !== 'trials')
    return <p>How much a group leaves open is worked out at closing, from how alike its listeners answered.</p>;
  if (!simulated?.guessing) return <p>Simulating what a group that guesses leaves open …</p>;
  const open = Math.max(0, aboveGuessingRate(simulated.guessing.medianLimit, planned.guessing));
  return (
    <p>
      How much a group leaves open depends on how much its trials differ. Where everybody guesses, half of the simulated
      studies do not exclude an above-chance rate up to {percent(Math.ceil(open * 100 - 1e-9) / 100)} (one-sided
      95&nbsp;% limit); habits that listeners share leave more open.
    </p>
  );
}
