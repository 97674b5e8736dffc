import { describe, expect, it } from 'vitest';
import { methodIds, methods } from '#shared/methods/methods.ts';
import { drawSeed, drawSession } from '#shared/session/draw.ts';

// What the live session, the phone, the planner and the report ask of every method.

describe.each(methodIds)('the method %s', (id) => {
  const method = methods[id];

  it('is listed under its own name and names the source it is published in [F1]', () => {
    expect(method.id).toBe(id);
    expect(method.source.length).toBeGreaterThan(20);
    expect(method.registered({}).name).toMatch(new RegExp(`^${id}/\\d+$`));
  });

  it('fits each truth in a way of its own, both cables as often at every presentation, and turns with the session’s draw [F1]', () => {
    const fitted = (truth: string, firstSide: 0 | 1) =>
      method.presentations.map((presentation) => method.fitted(presentation, truth, firstSide));
    for (const firstSide of [0, 1] as const) {
      const ways = method.truths.map((truth) => fitted(truth, firstSide).join());
      expect(new Set(ways).size).toBe(method.truths.length);
    }
    // Whatever is drawn, no place in a trial favours a cable.
    for (const index of method.presentations.keys()) {
      const cables = ([0, 1] as const).flatMap((side) => method.truths.map((truth) => fitted(truth, side)[index]));
      expect(cables.filter((cable) => cable === 0).length).toBe(cables.length / 2);
    }
    const known = (firstSide: 0 | 1) => method.familiarisation.map((label) => method.fitted(label, null, firstSide));
    expect([known(0), known(1)]).toEqual([
      [0, 1],
      [1, 0],
    ]);
  });

  it('draws every truth about equally often, trial by trial [F1]', () => {
    const seed = drawSeed('11'.repeat(32), ['22'.repeat(32)]);
    const { truths } = drawSession(seed, method, { specimenCounts: [1, 1], trials: 2000 });
    for (const truth of method.truths) {
      const share = truths.filter((drawn) => drawn === truth).length / truths.length;
      // Within four standard deviations of 1/2 at 2000 trials.
      expect(Math.abs(share - 1 / method.truths.length)).toBeLessThan(0.045);
    }
  });

  it('offers answers with words of their own, with every setting and without [F1]', () => {
    for (const settings of [[], method.settings.map((setting) => setting.id)]) {
      const options = method.options({ methodSettings: settings });
      for (const field of ['value', 'sentence', 'short'] as const)
        expect(new Set(options.map((option) => option[field])).size).toBe(options.length);
      expect(options.length).toBeGreaterThan(1);
    }
  });
});
