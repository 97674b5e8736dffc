import { useRef, useState } from 'react';
import { useFormContext } from 'react-hook-form';
import type { PlanWords } from '#shared/methods/method.ts';
import { formatCount, formatNumber } from '../../../lib/format.ts';
import { Button } from '../../../ui/button.tsx';
import type { StudyFormValues } from '../form/study-form-values.ts';
import { usePlan } from './plan-context.ts';
import type { Plan } from './plan-of.ts';
import type { SearchFound } from './plan-search.ts';
import { powerPercent } from './plan-words.ts';
import { PowerChart } from './power-chart.tsx';
import { PowerTable } from './power-table.tsx';
import { mostTrialsInAll, type Sittings, splitTrials } from './split-trials.ts';

/** How many trials find the effect, why not fewer, and what the planned number does. */
export function PlanNumber({ plan }: { plan: Plan }) {
  const { found, isCurrent } = usePlan();
  const title = useRef<HTMLHeadingElement>(null);
  const [taken, setTaken] = useState('');
  const { setValue } = useFormContext<StudyFormValues>();
  const words = plan.method.plan;
  if (found === null || found.own === null) return <p className="text-soft">Working out how many trials it takes …</p>;
  const { asked, own } = found;

  function take({ sessions, trials }: Sittings) {
    setValue('sessions', sessions, { shouldDirty: true, shouldValidate: true });
    setValue('trials', trials, { shouldDirty: true, shouldValidate: true });
    setTaken(`Planned: ${sittingsWords({ sessions, trials })}.`);
    title.current?.focus();
  }

  return (
    <section className="flex flex-col gap-3" aria-busy={!isCurrent}>
      <h3 ref={title} tabIndex={-1} className="text-lg">
        {titleOf(own.needed)}
      </h3>
      <p>{reasonOf(asked, own.needed, words)}</p>
      <Verdict found={found} plan={plan} onTake={take} />
      <p role="status" className="sr-only">
        {taken}
      </p>
      <PowerChart
        points={own.curve.points}
        planned={asked.trials}
        needed={own.needed}
        goal={asked.goal}
        caption={`Chance of finding ${words.atRate(asked.rate)}, by number of trials`}
      />
      <PowerTable power={own.power} words={words} />
    </section>
  );
}

type Numbers = NonNullable<SearchFound['own']>['needed'];

function titleOf({ nFirst, nSafe }: Numbers): string {
  if (nSafe === null) return 'How many trials it takes';
  return nFirst === null || nFirst === nSafe ? `Why ${nSafe}` : `Why ${nSafe} and not ${nFirst}`;
}

function reasonOf({ rate, goal }: SearchFound['asked'], needed: Numbers, words: PlanWords) {
  const { nFirst, nSafe } = needed;
  const at = words.atRate(rate);
  const above = powerPercent(goal);
  if (nFirst === null)
    return `No number of trials that was looked at finds ${at} in ${above} of studies: it is close to nothing.`;
  const first = `${formatCount(nFirst, 'trial')} find ${at} in ${above} of studies for the first time.`;
  if (nSafe === null) return `${first} From where on it stays above lies beyond what was looked at.`;
  if (nFirst === nSafe) return `${first} From there on it stays above.`;
  return `${first} More trials do not always help: the number needed jumps, and the chance of finding it saws. From ${formatNumber(nSafe)} on it stays above.`;
}

type VerdictProps = { found: SearchFound; plan: Plan; onTake: (sittings: Sittings) => void };

/** The planned number beside the one that is needed, and the button that takes that one over. */
function Verdict({ found: { asked, own }, plan, onTake }: VerdictProps) {
  const { isCurrent } = usePlan();
  if (own === null) return null;
  const [aimed] = own.power;
  const { nSafe } = own.needed;
  const does = `The ${formatNumber(asked.trials)} planned find it in ${powerPercent(aimed?.power ?? 0)} of studies`;
  if (nSafe === null) return <p>{does}.</p>;
  if (asked.trials >= nSafe) return <p>{does}, and are enough.</p>;
  const split = splitTrials(nSafe, plan);
  if (split === null)
    return (
      <p>
        {does}. A study can hold {formatCount(mostTrialsInAll, 'trial')} at most, so look for a larger effect or plan
        several studies.
      </p>
    );
  return (
    <div className="flex flex-wrap items-center gap-x-5 gap-y-2">
      <p>{does}, and are too few.</p>
      <Button disabled={!isCurrent} onClick={() => onTake(split)}>
        Plan {sittingsWords(split)}
      </Button>
    </div>
  );
}

const sittingsWords = ({ sessions, trials }: Sittings) =>
  `${formatCount(sessions, 'session')} of ${formatCount(trials, 'trial')}`;
