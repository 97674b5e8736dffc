import type { ReactNode } from 'react';
import { formatProbability } from '#shared/findings/format-probability.ts';
import { formatCount, formatNumber } from '../../../lib/format.ts';
import { PlanMargin } from './plan-margin.tsx';
import type { Plan } from './plan-of.ts';
import { percent } from './plan-words.ts';

/** The plan in a few sentences: what a finding needs and, with a margin, what finding nothing needs. */
export function PlanHeadline({ plan }: { plan: Plan }) {
  return (
    <div className="flex flex-col gap-3">
      <Needed plan={plan} />
      <PlanMargin plan={plan} />
    </div>
  );
}

function Needed({ plan }: { plan: Plan }) {
  if (!plan.figures.canReachAlpha) return <OutOfReach plan={plan} />;
  return plan.listeners === 1 ? <OwnDraws plan={plan} /> : <SharedDraws plan={plan} />;
}

function OwnDraws({ plan }: { plan: Plan }) {
  const { critical } = plan.figures;
  const words = plan.method.plan;
  if (words.unfixed !== null) return <Unfixed plan={plan} why={words.unfixed} />;
  if (critical === null) return <OutOfReach plan={plan} />;
  return (
    <Headline>
      Plan <Planned>{plan.trials} trials</Planned>. <Planned>{words.needed(critical.count)}</Planned> {words.underNull}{' '}
      <Planned>{percent(critical.attainedSize)}</Planned> of such tests wrongly find {words.found}.
    </Headline>
  );
}

/** A test whose number to reach is known only once the draws and the answers are. */
function Unfixed({ plan, why }: { plan: Plan; why: string }) {
  return (
    <div className="flex flex-col gap-3">
      <Headline>
        Plan <Planned>{plan.trials} trials</Planned>. No fixed number of {plan.method.plan.counted} can be promised.
      </Headline>
      <p>{why}</p>
    </div>
  );
}

function SharedDraws({ plan }: { plan: Plan }) {
  const { leastAttainableP, leastPDenominator } = plan.figures;
  const { counted } = plan.method.plan;
  return (
    <div className="flex flex-col gap-3">
      <Headline>
        Plan <Planned>{plan.trials} trials</Planned>, each heard by {plan.listeners}. No fixed number of {counted} can
        be promised.
      </Headline>
      <p>
        All listeners of a session hear the same presentations: there is one coin per trial, not one per answer. How
        many {counted} are needed depends on how alike the listeners answer; the registered test works it out at
        closing, exactly.
      </p>
      <p>
        The least p that {formatCount(plan.trials, 'trial')} can give is{' '}
        <span className="font-mono">{formatProbability(leastAttainableP)}</span> (1 in {drawsOf(leastPDenominator)}),
        however many listen. <strong>Plan trials, not heads.</strong>
      </p>
    </div>
  );
}

/** How many draws there are: written out as long as somebody reads it. */
function drawsOf(draws: bigint): ReactNode {
  if (draws <= 2n ** 30n) return formatNumber(Number(draws));
  return (
    <>
      more than 10<sup>{draws.toString().length - 1}</sup>
    </>
  );
}

function OutOfReach({ plan }: { plan: Plan }) {
  return (
    <Headline>
      {formatCount(plan.trials, 'trial')} can never find {plan.method.plan.found} at {percent(plan.alpha)}:{' '}
      {plan.method.plan.extreme} in {percent(plan.figures.leastAttainableP)} of tests. Plan more trials.
    </Headline>
  );
}

function Headline({ children }: { children: ReactNode }) {
  return <h2 className="text-[clamp(1.5rem,1.2rem+1.3vw,2rem)] leading-[1.25] text-pretty">{children}</h2>;
}

function Planned({ children }: { children: ReactNode }) {
  return <span className="whitespace-nowrap text-copper">{children}</span>;
}
