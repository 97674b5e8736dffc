import { formatDuration } from '../../../lib/format.ts';
import { Figure, FigureRow } from '../../../ui/figure.tsx';
import { FoundShare } from './found-share.tsx';
import { breaks, type Plan } from './plan-of.ts';
import { percent } from './plan-words.ts';

/** What the plan asks of people and of the clock, and the level that it really has. */
export function PlanFigures({ plan }: { plan: Plan }) {
  const isSeveral = plan.sessions > 1;
  return (
    <div className="flex flex-col gap-4">
      <FigureRow>
        <Figure value={plan.sessions} label={isSeveral ? 'sessions' : 'session'} />
        <Figure value={plan.fittings} label={plan.isAtMost ? 'changes of cable, at most' : 'changes of cable'} />
        <Figure value={clockWords(plan.minutes)} label={isSeveral ? 'in all, with breaks' : 'with breaks'} />
        <Figure value={<FoundShare />} label="chance of finding it" />
      </FigureRow>
      <p className="text-soft">
        {levelWords(plan)} {isSeveral ? `Each session takes ${clockWords(plan.minutesPerSession)}. ` : ''}
        {breakWords(plan)} Familiarisation is counted in.
        {plan.isAtMost ? ' Changes and time are for a listener who asks for all that a trial allows.' : ''}
      </p>
    </div>
  );
}

const clockWords = (minutes: number) => formatDuration(minutes * 60_000);

/** A group's test has no fixed limit, so its true level cannot be told beforehand either; it holds the one asked for. */
function levelWords({ method, listeners, alpha, alternative, figures }: Plan): string {
  const side = alternative === 'two-sided' ? ', both sides together' : '';
  const guessing = figures.chance === null ? '' : `${method.plan.guessing} ${percent(figures.chance)} of the time. `;
  if (listeners > 1 || figures.critical === null) return `${guessing}The level asked for is ${percent(alpha)}${side}.`;
  return `${guessing}The level asked for is ${percent(alpha)}${side}; counts being whole, the test really has ${percent(figures.critical.attainedSize)}.`;
}

function breakWords({ trialsPerSession }: Plan): string {
  const { everyTrials, lengthMs } = breaks;
  if (trialsPerSession <= everyTrials) return 'One block, without a break.';
  return `A break of ${formatDuration(lengthMs)} after every ${everyTrials} trials.`;
}
