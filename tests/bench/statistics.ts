import { execFileSync } from 'node:child_process';
import { createRequire } from 'node:module';
import { Bench } from 'tinybench';
import { betaBinomialFit } from '#shared/statistics/beta-binomial.ts';
import { binomialTest } from '#shared/statistics/binomial-test.ts';
import { evenChance } from '#shared/statistics/chance.ts';
import { chiSquareUpperTail } from '#shared/statistics/chi-square-tail.ts';
import { clopperPearson } from '#shared/statistics/clopper-pearson.ts';
import { fisherExactTest } from '#shared/statistics/fisher-exact.ts';
import { heterogeneity } from '#shared/statistics/heterogeneity.ts';
import { holm } from '#shared/statistics/holm.ts';
import { listenerClusterInterval } from '#shared/statistics/listener-cluster-interval.ts';
import { sampleSize } from '#shared/statistics/sample-size.ts';
import { sharedPresentationTest } from '#shared/statistics/shared-presentation-test.ts';
import { taroneTest } from '#shared/statistics/tarone.ts';

// npm run bench:statistics: what the statistics cost beside jstat and R, as ratios, timed in the same run on the same
// machine. jstat's figures are those of its distribution functions, which lose the tails that a claim needs; R's are those
// of base R, with the time to call a function but without that to start.

interface Rival {
  readonly binomial: { cdf(successes: number, trials: number, rate: number): number };
  readonly beta: { inv(p: number, a: number, b: number): number };
  readonly chisquare: { cdf(statistic: number, degreesOfFreedom: number): number };
}
const rival = createRequire(import.meta.url)('jstat') as Rival;

const listeners = 100;
const rightOf = (listener: number, trials: number) => Math.floor(trials * (0.5 + ((listener * 7919) % 97) / 400));
const scoresOf = (trials: number) =>
  Array.from({ length: listeners }, (_, listener) => ({ successes: rightOf(listener, trials), trials }));

/** Each listener's p, limits and adjusted p, and whether and how the listeners differ. */
function report(trials: number) {
  const scores = scoresOf(trials);
  const pValues = scores.map(({ successes }) => binomialTest(successes, trials, evenChance, 'greater').p);
  return {
    limits: scores.map(({ successes }) => clopperPearson(successes, trials, 0.95)),
    adjusted: holm(pValues),
    among: heterogeneity(scores),
    tarone: taroneTest(scores),
    mean: listenerClusterInterval(scores, 0.95),
  };
}

/** As much of it as jstat has functions for. */
function rivalReport(trials: number) {
  const scores = scoresOf(trials);
  const rate = scores.reduce((sum, { successes }) => sum + successes, 0) / (listeners * trials);
  const among = scores.reduce(
    (sum, { successes }) => sum + (successes - trials * rate) ** 2 / (trials * rate * (1 - rate)),
    0,
  );
  return {
    pValues: scores.map(({ successes }) => 1 - rival.binomial.cdf(successes - 1, trials, 0.5)),
    limits: scores.map(({ successes }) => [
      rival.beta.inv(0.025, successes, trials - successes + 1),
      rival.beta.inv(0.975, successes + 1, trials - successes),
    ]),
    among: 1 - rival.chisquare.cdf(among, listeners - 1),
  };
}

const shared = Array.from({ length: 100 }, (_, trial) => ({
  counts: [(trial * 37) % 101, 100 - ((trial * 37) % 101)],
  truth: trial % 2,
  missing: 0,
}));

interface Piece {
  readonly what: string;
  /** The name of the same work in statistics.R. */
  readonly inR: string;
  /** Largest multiple of R's time, some three times what was measured: it catches a change of order, not a busy machine. */
  readonly limit: number;
  readonly work: () => unknown;
  readonly rival?: () => unknown;
}

const pieces: readonly Piece[] = [
  {
    what: 'report: 10,000 trials, 100 listeners with 100 each',
    inR: 'report 100',
    limit: 8,
    work: () => report(100),
    rival: () => rivalReport(100),
  },
  {
    what: 'report: 10,000 trials by each of 100 listeners',
    inR: 'report 10000',
    limit: 66,
    work: () => report(10_000),
    rival: () => rivalReport(10_000),
  },
  {
    what: 'shared presentations: 100 trials, 100 listeners, exact',
    inR: 'shared',
    limit: 7,
    work: () => sharedPresentationTest(shared, 'greater'),
  },
  {
    what: 'beta-binomial fit, 100 listeners with 100 trials each',
    inR: 'beta-binomial',
    limit: 8,
    work: () => betaBinomialFit(scoresOf(100)),
  },
  {
    what: 'binomial test, 60 of 100, one-sided, with log and mid-p',
    inR: 'one-sided test',
    limit: 0.1,
    work: () => binomialTest(60, 100, evenChance, 'greater'),
    rival: () => 1 - rival.binomial.cdf(59, 100, 0.5),
  },
  {
    what: 'the same beside R’s bare tail',
    inR: 'one-sided',
    limit: 2,
    work: () => binomialTest(60, 100, evenChance, 'greater'),
  },
  {
    what: 'binomial test, 682 of 925 against 3/4, least likelihood',
    inR: 'two-sided',
    limit: 0.2,
    work: () => binomialTest(682, 925, { numerator: 3, denominator: 4 }, 'two-sided'),
  },
  {
    what: 'Clopper-Pearson limits, 60 of 100',
    inR: 'limits',
    limit: 11,
    work: () => clopperPearson(60, 100, 0.95),
    rival: () => [rival.beta.inv(0.025, 60, 41), rival.beta.inv(0.975, 61, 40)],
  },
  {
    what: 'safe number of trials, rate .7, power .9',
    inR: 'trials',
    limit: 0.06,
    work: () => sampleSize({ chance: evenChance, alpha: 0.05, correctRate: 0.7, targetPower: 0.9, limit: 3000 }),
  },
  {
    what: 'Fisher’s exact test of 100 answers, two-sided',
    inR: 'fisher',
    limit: 1,
    work: () =>
      fisherExactTest(
        [
          [30, 20],
          [22, 28],
        ],
        'two-sided',
      ),
  },
  {
    what: 'chi-square upper tail',
    inR: 'chi-square',
    limit: 0.5,
    work: () => chiSquareUpperTail(21.18, 9),
    rival: () => 1 - rival.chisquare.cdf(21.18, 9),
  },
];

async function secondsOf(work: () => unknown): Promise<number> {
  const bench = new Bench({ time: 500, warmupTime: 150 }).add('work', work);
  await bench.run();
  const result = bench.getTask('work')?.result;
  if (result === undefined || result.error !== undefined) throw result?.error ?? new Error('the work did not run');
  const { samples } = result;
  return (samples.toSorted((a, b) => a - b)[samples.length >> 1] ?? Number.NaN) / 1000;
}

const script = new URL('statistics.R', import.meta.url).pathname;
const inR = new Map(
  execFileSync('Rscript', [script], { encoding: 'utf8' })
    .trim()
    .split('\n')
    .map((line) => line.split('\t') as [string, string]),
);

const times = (ratio: number) => `${ratio < 10 ? ratio.toPrecision(2) : ratio.toFixed(0)} x`.padStart(8);
console.log('time here as a multiple of:     jstat       R');
for (const { what, inR: name, limit, work, rival: other } of pieces) {
  const here = await secondsOf(work);
  const there = Number(inR.get(name));
  if (!(there > 0)) throw new Error(`R gave no time for ${name}`);
  const beside = other === undefined ? '       -' : times(here / (await secondsOf(other)));
  const milliseconds = `${(here * 1000).toPrecision(3)} ms`;
  console.log(
    `${milliseconds.padStart(28)} ${beside} ${times(here / there)}   ${what}${here / there > limit ? `; BEYOND ${limit} x` : ''}`,
  );
  if (here / there > limit) process.exitCode = 1;
}
