import type { ReactNode } from 'react';
import type { MarginOffer } from '#shared/methods/method.ts';
import type { PlannedMargin } from '#shared/statistics/planned-margin.ts';
import { formatCount, formatNumber } from '../../../lib/format.ts';
import { usePlan } from './plan-context.ts';
import type { Plan } from './plan-of.ts';
import { powerPercent } from './plan-words.ts';
import { simulatedShare } from './use-group-simulation.ts';

/** What the registered margin takes, and how often a study shows it when nobody hears anything; nothing without one. */
export function PlanMargin({ plan }: { plan: Plan }) {
  const { margin, planned } = plan.method;
  const { marginPercent } = plan.choices;
  if (margin === null || planned.margin === null || marginPercent === undefined) return null;
  const asked = { plan, offer: margin, test: planned.margin, percent: marginPercent };
  if (margin.counts === 'listeners') return <OfPeople {...asked} />;
  return plan.listeners > 1 ? <OfGroup {...asked} /> : <OfAnswers {...asked} />;
}

type Asked = { plan: Plan; offer: MarginOffer; test: PlannedMargin; percent: number };

function OfAnswers({ plan, offer, test, percent }: Asked) {
  const share = percent / 100;
  const critical = test.critical(plan.trials, share);
  if (critical === null) return <OutOfReach what={formatCount(plan.trials, 'trial')} shows={offer.shows(percent)} />;
  return (
    <p className="text-lg text-pretty">
      With <Copper>{offer.most(critical.count, plan.trials)}</Copper> the study shows {offer.shows(percent)}. If nobody
      hears anything, <Copper>{powerPercent(test.power(plan.trials, share, 0))}</Copper> of such studies show it.
    </p>
  );
}

/** Whether the same people come to several sessions is not planned, so the number is the most it can be. */
function OfPeople({ plan, offer, test, percent }: Asked) {
  const share = percent / 100;
  const people = plan.sessions * plan.listeners;
  const seats = formatCount(people, 'person', 'people');
  const critical = test.critical(people, share);
  if (critical === null) return <OutOfReach what={seats} shows={offer.shows(percent)} />;
  return (
    <p className="text-lg text-pretty">
      With {seats}, all of them different, <Copper>{offer.most(critical.count, people)}</Copper> show{' '}
      {offer.shows(percent)}. If each is as likely to prefer either,{' '}
      <Copper>{powerPercent(test.power(people, share, 0))}</Copper> of such studies show it.
    </p>
  );
}

/** A group's limit goes by how much its trials differ, so that no count can be fixed: it is simulated. */
function OfGroup({ offer, percent }: Asked) {
  const { simulated } = usePlan();
  const guessing = simulated?.guessing;
  if (!simulated || guessing == null || guessing.shown === null)
    return <p className="text-lg">Simulating how often a group that guesses shows {offer.shows(percent)} …</p>;
  return (
    <p className="text-lg text-pretty">
      If nobody hears anything, <Copper>{powerPercent(simulatedShare(guessing.shown, simulated.done))}</Copper> of such
      studies show {offer.shows(percent)}: so many of {formatNumber(simulated.done)} simulated ones. No count can be
      fixed for a group; the limit is worked out from how much the trials differ.
    </p>
  );
}

function OutOfReach({ what, shows }: { what: string; shows: string }) {
  return (
    <p className="text-lg text-pretty">
      {what} can never show {shows}, whatever is answered.
    </p>
  );
}

function Copper({ children }: { children: ReactNode }) {
  return <span className="font-semibold text-copper">{children}</span>;
}
