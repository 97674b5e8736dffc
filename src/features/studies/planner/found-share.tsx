import { usePlan } from './plan-context.ts';
import { powerPercent } from './plan-words.ts';
import { simulatedShare } from './use-group-simulation.ts';

/** How often a study of this plan finds the effect it is planned for; dots while that is being worked out. */
export function FoundShare() {
  const { plan, found, isCurrent, simulated } = usePlan();
  if (plan !== null && plan.listeners > 1)
    return <>{simulated === null ? '…' : powerPercent(simulatedShare(simulated.found[0] ?? 0, simulated.done))}</>;
  const [aimed] = found?.own?.power ?? [];
  return <>{aimed === undefined || !isCurrent ? '…' : powerPercent(aimed.power)}</>;
}
