import { useWatch } from 'react-hook-form';
import { formatCount, formatNumber } from '../../../lib/format.ts';
import { Notice } from '../../../ui/notice.tsx';
import type { StudyFormValues } from '../form/study-form-values.ts';
import type { GroupPowerSoFar } from './group-power-worker.ts';
import { usePlan } from './plan-context.ts';
import { breaks, type Plan, rateOf } from './plan-of.ts';
import type { SearchFound } from './plan-search.ts';
import { powerPercent } from './plan-words.ts';
import { simulatedShare } from './use-group-simulation.ts';

/** What the plan cannot show, said before it is sealed. */
export function PlanWarnings({ plan }: { plan: Plan }) {
  const { found, isCurrent, simulated, aim } = usePlan();
  const levels = useWatch<StudyFormValues, 'levels'>({ name: 'levels' });
  const words = plan.method.plan;
  const caution = words.caution(plan.choices);
  const margin = marginWarning(plan, isCurrent ? found : null, simulated);
  return (
    <div className="flex flex-col gap-4">
      {found?.own && plan.figures.canReachAlpha ? (
        <>
          <OnlyLargeEffects plan={plan} found={found} />
          <StrongerWithFewer plan={plan} found={found} />
        </>
      ) : null}
      {isBeyondMatched(plan, aim.share) && plan.listeners > 1 ? (
        <Notice tone="amber" title="A large effect is looked for.">
          {words.smallEffect} {words.atRate(plan.method.planned.rates[0])}.
        </Notice>
      ) : null}
      {margin === null ? null : (
        <Notice tone="amber" title="The margin asks for more.">
          {margin}
        </Notice>
      )}
      <LongSessions plan={plan} />
      {caution === null ? null : <Notice title={caution.title}>{caution.words}</Notice>}
      {levels === undefined ? (
        <Notice tone="amber" title="Level is not measured.">
          If the two cables differ in level at the load, loudness alone may explain what is found, and the finding will
          say so. Register how level is handled under “Level at the load”.
        </Notice>
      ) : null}
    </div>
  );
}

const isBeyondMatched = ({ method }: Plan, share: number) => rateOf(method, share) > method.planned.rates[0] + 1e-9;

type Warning = { plan: Plan; found: SearchFound };

/** What a plan misses is named by the effect that matched cables rarely exceed. */
function OnlyLargeEffects({ plan: { method }, found: { asked, own } }: Warning) {
  const [smallEffect] = method.planned.rates;
  const atSmall = own?.power[1];
  if (own === null || atSmall === undefined || atSmall.power >= asked.goal) return null;
  const { nSafe } = own.neededForSmall;
  return (
    <Notice tone="amber" title={`${formatCount(asked.trials, 'trial')} find only large effects.`}>
      {method.plan.smallEffect} {method.plan.atRate(smallEffect)}; that would be missed in{' '}
      {powerPercent(1 - atSmall.power)} of such studies. To find it in {powerPercent(asked.goal)}, plan{' '}
      {nSafe === null ? `more than ${formatCount(method.planned.searchedTo, 'trial')}` : formatCount(nSafe, 'trial')}.
    </Notice>
  );
}

/** The saw: a few trials fewer need one right answer fewer, and find more. */
function StrongerWithFewer({ plan: { method }, found: { asked, own } }: Warning) {
  if (own === null || own.curve.stronger === null) return null;
  const { trials, power } = own.curve.stronger;
  const planned = own.power[0]?.power ?? 0;
  return (
    <Notice
      tone="amber"
      title={`${formatCount(trials, 'trial')} would find it more often than ${formatNumber(asked.trials)}.`}
    >
      {powerPercent(power)} of studies against {powerPercent(planned)}, for {method.plan.atRate(asked.rate)}: the number
      needed jumps in between.
    </Notice>
  );
}

function LongSessions({ plan: { trialsPerSession, sessions } }: { plan: Plan }) {
  const { everyTrials } = breaks;
  if (trialsPerSession <= everyTrials) return null;
  const blocks = Math.ceil(trialsPerSession / everyTrials);
  return (
    <Notice tone="amber" title={`More than ${everyTrials} trials in a row tire.`}>
      Each session has {blocks} blocks with a break of ten minutes in between.
      {sessions > 1 ? ' Nobody should listen to more than 3 blocks on one day, so spread the sessions.' : ''} Common
      practice, without a published source.
    </Notice>
  );
}

/** Why the planned number cannot show the registered margin, or only with luck; null where it can, or none is registered. */
function marginWarning(plan: Plan, found: SearchFound | null, simulated: GroupPowerSoFar | null): string | null {
  const { margin, planned } = plan.method;
  const { marginPercent } = plan.choices;
  if (margin === null || planned.margin === null || marginPercent === undefined) return null;
  const shows = margin.shows(marginPercent);
  if (margin.counts === 'trials' && plan.listeners > 1) {
    if (!simulated?.guessing || simulated.guessing.shown === null) return null;
    const power = simulatedShare(simulated.guessing.shown, simulated.done);
    return power >= leastPower
      ? null
      : `If nobody hears anything, only ${powerPercent(power)} of such studies show ${shows}. More trials help, more listeners on the same trials less.`;
  }
  const counted = margin.counts === 'trials' ? plan.trials : plan.sessions * plan.listeners;
  const share = marginPercent / 100;
  const power = planned.margin.power(counted, share, 0);
  if (power >= leastPower) return null;
  const counts = margin.counts === 'trials' ? formatCount(counted, 'trial') : formatCount(counted, 'person', 'people');
  const nSafe = found?.asked.marginPercent === marginPercent ? found.marginNeeded?.nSafe : null;
  const needed =
    nSafe == null
      ? ''
      : ` It takes ${margin.counts === 'trials' ? formatCount(nSafe, 'trial') : formatCount(nSafe, 'person', 'people')} to show it in 90\u00a0% of studies.`;
  return power === 0
    ? `With ${counts} no count shows ${shows}.${needed}`
    : `With ${counts} only ${powerPercent(power)} of studies in which there is nothing show ${shows}.${needed}`;
}

/** Common practice, no source: a study that is to show something should do so in four of five cases. */
const leastPower = 0.8;
