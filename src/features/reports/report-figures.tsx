import type { Report } from '#shared/contracts/reports.ts';
import { equationOfP } from '#shared/findings/format-probability.ts';
import type { PooledEstimates } from '#shared/findings/registered-result.ts';
import { Figure, FigureRow } from '../../ui/figure.tsx';
import { percentOf, testWords } from './report-words.ts';

/** The count leads; p with its test, and an effect only where one is valid. */
export function ReportFigures({ result }: Pick<Report, 'result'>) {
  const { correct, answers, p, alpha, test, estimates } = result;
  return (
    <div className="flex flex-col gap-3">
      <FigureRow>
        <Figure isLead value={`${correct} / ${answers}`} label="answers matched X" />
        <Figure value={equationOfP(Number(p.value), Number(alpha))} label={testWords[test]} />
        {estimates ? <Effect {...estimates} /> : null}
      </FigureRow>
      <p className="max-w-3xl text-soft">{estimates ? sensitivityWords(estimates) : noInterval}</p>
    </div>
  );
}

const noInterval =
  'No effect with an interval is given: answers to a shared presentation are not independent, and no interval for such a group is valid yet. Each listener’s own rate, with its interval, is below.';

function Effect({ aboveGuessing: { rate, interval } }: PooledEstimates) {
  const limits = `${percentOf(interval.lower, 'down')} to ${percentOf(interval.upper, 'up')}`;
  return <Figure value={percentOf(rate)} label={`of answers above guessing, 95 % interval ${limits}`} />;
}

/** Both readings of ABX, the one by differences first; each depends on its model and decides nothing. */
function sensitivityWords({ dPrime: { differencing, independent } }: PooledEstimates): string {
  const face = ({ dPrime, lower, upper }: typeof differencing) =>
    `${figureOf(dPrime)} (95 % interval ${figureOf(lower)} to ${figureOf(upper)})`;
  return `Expressed as d′, which depends on how listeners compare: ${face(differencing)} if by differences, ${face(independent)} if each is judged by itself.`;
}

function figureOf(limit: string): string {
  return limit === 'Infinity' ? 'no upper limit' : Number(limit).toFixed(2);
}
