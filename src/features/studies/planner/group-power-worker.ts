import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { type GroupPlan, groupFindings } from '#shared/statistics/group-power.ts';

export type GroupPowerAsked = Omit<GroupPlan, 'rate'> & { readonly rates: readonly number[] };
/** What has been simulated so far, one figure for each rate that was asked. */
export type GroupPowerSoFar = { readonly done: number; readonly of: number; readonly found: readonly number[] };

/** The same plan always gives the same figure. */
const seed = 20_261_201;
const studies = 2_000;
const atOnce = 100;

self.addEventListener('message', ({ data }: MessageEvent<GroupPowerAsked>) => {
  const { rates, ...plan } = data;
  const sources = rates.map((_, index) => xoroshiro128plus(seed + index));
  const found = rates.map(() => 0);
  for (let done = 0; done < studies; done += atOnce) {
    for (const [index, rate] of rates.entries()) {
      const source = sources[index];
      if (source === undefined) continue;
      found[index] = (found[index] ?? 0) + groupFindings({ ...plan, rate }, atOnce, () => uniformFloat64(source));
    }
    const soFar: GroupPowerSoFar = { done: done + atOnce, of: studies, found: [...found] };
    self.postMessage(soFar);
  }
});
