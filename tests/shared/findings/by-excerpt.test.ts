import { describe, expect, it } from 'vitest';
import { resultsByExcerpt } from '#shared/findings/by-excerpt.ts';
import type { ScoredTrial } from '#shared/methods/method.ts';
import { methods } from '#shared/methods/methods.ts';

const trial = (number: number, excerpt: number, truth: string, ...choices: (string | null)[]) => ({
  session: 1,
  trial: number,
  excerpt,
  truth,
  answers: choices.map((choice, index) => ({ listener: `L0${index + 1}`, choice })),
});
const found = (
  method: keyof typeof methods,
  trials: readonly (ScoredTrial & { readonly excerpt: number })[],
  excerpts = 2,
) => resultsByExcerpt(trials, methods[method].trials.rates(['Harbour', 'Quay']), excerpts);

describe('results by excerpt', () => {
  it('count right answers per excerpt, with Clopper-Pearson limits where draws are own [S83]', () => {
    const trials = Array.from({ length: 16 }, (_, index) => trial(index + 1, index % 2, 'A', index < 13 ? 'A' : 'B'));
    const [first, second] = found('abx', trials);
    expect(first).toMatchObject({ trials: 8, rates: [{ label: 'Right', counted: 7, due: 8, missing: 0 }] });
    expect(second?.rates[0]).toMatchObject({ counted: 6, due: 8 });
    // R: binom.test(7, 8)$conf.int
    expect(first?.rates[0]?.interval?.lower).toBeCloseTo(0.4734903, 6);
    expect(first?.rates[0]?.interval?.upper).toBeCloseTo(0.9968403, 6);
  });

  it('count trials and not answers in a group, and give no limits where nothing varies [S83]', () => {
    const alike = [trial(1, 0, 'A', 'A', 'B'), trial(2, 0, 'B', 'B', 'A')];
    expect(found('abx', alike)[0]?.rates[0]).toMatchObject({ counted: 2, due: 4, interval: null });
    const varied = [...alike, trial(3, 0, 'A', 'A', 'A'), trial(4, 0, 'A', 'B', 'B')];
    const interval = found('abx', varied)[0]?.rates[0]?.interval;
    expect(interval?.lower).toBeLessThan(0.5);
    // Wider than Clopper-Pearson of 4 of 8 would be: 0.1570 ... 0.8430.
    expect((interval?.upper ?? 0) - (interval?.lower ?? 0)).toBeGreaterThan(0.6);
  });

  it('speak in each method’s own rates: hits and false alarms, or answers for the first cable [S83]', () => {
    const pairs = [trial(1, 0, 'AB', 'different'), trial(2, 0, 'AA', 'different'), trial(3, 0, 'BB', null)];
    expect(found('same-different', pairs)[0]?.rates).toMatchObject([
      { label: 'Hits', counted: 1, due: 1 },
      { label: 'False alarms', counted: 1, due: 2, missing: 1 },
    ]);
    const liked = [trial(1, 0, 'first', 'first'), trial(2, 0, 'second', 'first'), trial(3, 0, 'first', 'none')];
    expect(found('paired-preference', liked)[0]?.rates).toMatchObject([{ label: 'For Harbour', counted: 1, due: 2 }]);
  });

  it('list an excerpt that was never played with nothing counted, and never a p [S83]', () => {
    const [, second] = found('triangle', [trial(1, 0, 'AAB', 'third')]);
    expect(second).toEqual({
      excerpt: 1,
      trials: 0,
      rates: [{ label: 'Right', counted: 0, due: 0, missing: 0, interval: null }],
    });
  });
});
