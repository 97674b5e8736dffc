import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { type GroupPlan, groupFindings } from '#shared/statistics/group-power.ts';
import { sameDifferentGroupFindings } from '#shared/statistics/same-different-group-power.ts';

export type GroupPowerAsked = Omit<GroupPlan, 'rate' | 'labels'> & {
  readonly rates: readonly number[];
  /** How many labels the draw chooses from, or null for pairs that are the same or different. */
  readonly labels: number | null;
};
/** What has been simulated so far, one figure for each rate that was asked. */
export type GroupPowerSoFar = { readonly done: number; readonly of: number; readonly found: readonly number[] };

/** The same plan always gives the same figure. */
const seed = 20_261_201;
const studies = 2_000;
const atOnce = 100;

self.addEventListener('message', ({ data }: MessageEvent<GroupPowerAsked>) => {
  const { rates, labels, ...plan } = data;
  const findings = (rate: number, uniform: () => number) =>
    labels === null
      ? sameDifferentGroupFindings({ ...plan, rate }, atOnce, uniform)
      : groupFindings({ ...plan, labels, rate }, atOnce, uniform);
  const sources = rates.map((_, index) => xoroshiro128plus(seed + index));
  const found = rates.map(() => 0);
  for (let done = 0; done < studies; done += atOnce) {
    for (const [index, rate] of rates.entries()) {
      const source = sources[index];
      if (source === undefined) continue;
      found[index] = (found[index] ?? 0) + findings(rate, () => uniformFloat64(source));
    }
    const soFar: GroupPowerSoFar = { done: done + atOnce, of: studies, found: [...found] };
    self.postMessage(soFar);
  }
});
