import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import type { SharedAnswer } from '#shared/statistics/shared-cluster-interval.ts';

/** A panel that hears nothing and shares a habit: in each trial all lean to the same label, drawn anew, so often. */
export type Panel = { readonly trials: number; readonly listeners: number; readonly leaning: number };

export type HeardNothing = {
  /** Answers that fit the draw and answers that do not, trial by trial. */
  readonly counts: readonly (readonly [number, number])[];
  readonly answers: readonly SharedAnswer[];
  readonly right: number;
};

/** Studies of such a panel, the same for the same seed; X is drawn for each trial and nobody's answer depends on it. */
export function* studiesWithoutHearing(panel: Panel, studies: number, seed: number): Generator<HeardNothing> {
  const source = xoroshiro128plus(seed);
  const uniform = () => uniformFloat64(source);
  for (let study = 0; study < studies; study += 1) {
    const answers: SharedAnswer[] = [];
    const counts: [number, number][] = [];
    for (let trial = 0; trial < panel.trials; trial += 1) {
      const [drawn, leansTo] = [uniform() < 0.5, uniform() < 0.5];
      let fitting = 0;
      for (let listener = 0; listener < panel.listeners; listener += 1) {
        const answer = uniform() < panel.leaning ? leansTo : !leansTo;
        const isRight = answer === drawn;
        if (isRight) fitting += 1;
        answers.push({ listener: `L${listener}`, trial: `1/${trial}`, isRight });
      }
      counts.push([fitting, panel.listeners - fitting]);
    }
    yield { counts, answers, right: counts.reduce((sum, [fitting]) => sum + fitting, 0) };
  }
}
