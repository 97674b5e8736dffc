import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { groupUpperLimits } from '#shared/statistics/group-margin.ts';
import { type GroupPlan, groupFindings } from '#shared/statistics/group-power.ts';
import { groupTrialsNeeded } from '#shared/statistics/group-trials-needed.ts';
import { sameDifferentGroupFindings } from '#shared/statistics/same-different-group-power.ts';

export type GroupPowerAsked = Omit<GroupPlan, 'rate' | 'labels'> & {
  readonly rates: readonly number[];
  /** How many labels the draw chooses from, or null for pairs that are the same or different. */
  readonly labels: number | null;
  /** Chance of a right answer by guessing, where a limit of the rate is wanted; null where there is none for a group. */
  readonly guessing: number | null;
  /** How often the first of the rates is to be found. */
  readonly goal: number;
  /** The rate of right answers at the registered margin, or null. */
  readonly marginRate: number | null;
};
/** What has been simulated so far, one figure for each rate that was asked. */
export type GroupPowerSoFar = {
  readonly done: number;
  readonly of: number;
  readonly found: readonly number[];
  /** Of studies in which nobody hears anything. */
  readonly guessing: {
    /** The upper limit that half of them stay below. */
    readonly medianLimit: number;
    /** How many of them show the margin; null without one. */
    readonly shown: number | null;
  } | null;
  /** About how many trials find the first rate as often as asked, null where even the most do not; nothing while it is looked for. */
  readonly needed?: number | null;
};

/** The same plan always gives the same figure. */
const seed = 20_261_201;
const studies = 2_000;
const atOnce = 100;
/** Fewer for each number of trials that is tried on the way to the one that is needed. */
const studiesTried = 400;
/** No more trials than these are tried: a study of pairs takes longer to simulate. */
const mostTried = { labels: 320, pairs: 120 };

self.addEventListener('message', ({ data }: MessageEvent<GroupPowerAsked>) => {
  const { rates, labels, guessing, marginRate, goal, ...plan } = data;
  const findings = (rate: number, uniform: () => number, count = atOnce, trials = plan.trials) =>
    labels === null
      ? sameDifferentGroupFindings({ ...plan, trials, rate }, count, uniform)
      : groupFindings({ ...plan, trials, labels, rate }, count, uniform);
  const sourceOf = (index: number) => {
    const generator = xoroshiro128plus(seed + index);
    return () => uniformFloat64(generator);
  };
  const sources = rates.map((_, index) => sourceOf(index));
  const guesses = sourceOf(rates.length);
  const found = rates.map(() => 0);
  const limits: number[] = [];
  for (let done = 0; done < studies; done += atOnce) {
    for (const [index, rate] of rates.entries()) {
      const source = sources[index];
      if (source !== undefined) found[index] = (found[index] ?? 0) + findings(rate, source);
    }
    if (guessing !== null) limits.push(...groupUpperLimits({ ...plan, guessing }, atOnce, guesses));
    const soFar: GroupPowerSoFar = {
      done: done + atOnce,
      of: studies,
      found: [...found],
      guessing: guessing === null ? null : summary(limits, marginRate),
    };
    self.postMessage(soFar);
    if (soFar.done < soFar.of) continue;
    const [aimed = 0.5] = rates;
    const needed = groupTrialsNeeded(
      (trials) => findings(aimed, sourceOf(trials), studiesTried, trials) / studiesTried,
      goal,
      labels === null ? mostTried.pairs : mostTried.labels,
    );
    self.postMessage({ ...soFar, needed } satisfies GroupPowerSoFar);
  }
});

function summary(limits: readonly number[], marginRate: number | null): GroupPowerSoFar['guessing'] {
  const sorted = limits.toSorted((a, b) => a - b);
  return {
    medianLimit: sorted[Math.floor(sorted.length / 2)] ?? 1,
    shown: marginRate === null ? null : limits.filter((limit) => limit < marginRate).length,
  };
}
