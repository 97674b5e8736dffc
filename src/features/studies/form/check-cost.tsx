import { formatCount, formatDuration } from '../../../lib/format.ts';
import { usePlan } from '../planner/plan-context.ts';

/** What check trials take, said where they are chosen. */
export function CheckCost() {
  const { plan } = usePlan();
  if (plan === null || plan.checkTrials === 0) return null;
  const { trialMs } = plan.figures.session;
  const fittings = plan.checkTrials * plan.method.presentations.length;
  return (
    <p className="text-soft">
      {formatCount(plan.checkTrials, 'check trial')} in each session:{' '}
      {formatDuration(Math.ceil((plan.checkTrials * trialMs) / 60_000) * 60_000)} and {fittings} changes more, beside
      the {plan.trialsPerSession - plan.checkTrials} trials of the question. The plan counts them in.
    </p>
  );
}
