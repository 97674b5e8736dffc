import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { abx } from '#shared/methods/abx.ts';
import { methodIds, methods } from '#shared/methods/methods.ts';
import { type DrawShape, drawSeed, drawSession } from '#shared/session/draw.ts';
import { fairNumber } from '#shared/session/fair-number.ts';
import { codeFitted, kindOf } from '#shared/session/fitting.ts';
import type { SessionState } from '#shared/session/state.ts';
import { type CheckShape, cableFitted, checkTrialsIn, drawKinds, stepOf } from '#shared/session/trial-kinds.ts';

const secret = '00010203040506070809'.padEnd(64, '0');
const seedOf = (number: number) => drawSeed(number.toString(16).padStart(64, '0'), ['02'.repeat(32)]);
const checks: CheckShape = { reference: 0, steps: [3, 2], same: 2 };

describe('which trials are check trials', () => {
  it('are as many of each kind as registered, whatever the seed [S84]', () => {
    for (let number = 0; number < 20; number += 1) {
      const kinds = drawKinds(seedOf(number), 12, checks);
      const counts = ['main', 'step/0', 'step/1', 'same'].map((kind) => kinds.filter((one) => one === kind).length);
      expect(counts).toEqual([5, 3, 2, 2]);
    }
    expect(checkTrialsIn(checks)).toBe(7);
    expect(checkTrialsIn(undefined)).toBe(0);
    expect(() => drawKinds(seedOf(1), 6, checks)).toThrow(RangeError);
  });

  it('fall on every number alike: 4,000 shuffles of 4 trials pass a chi-square test at .001 [S84]', () => {
    const counts = new Map<string, number>();
    for (let number = 0; number < 4000; number += 1) {
      const order = drawKinds(seedOf(number), 4, { reference: 0, steps: [1, 1], same: 1 }).join();
      counts.set(order, (counts.get(order) ?? 0) + 1);
    }
    expect(counts.size).toBe(24);
    const expected = 4000 / 24;
    const chiSquare = [...counts.values()].reduce((sum, count) => sum + (count - expected) ** 2 / expected, 0);
    // qchisq(.999, 23) in R
    expect(chiSquare).toBeLessThan(49.73);
  });

  it('leave the truths, the sides and the specimens of the draw as they were [S84]', () => {
    const shape: DrawShape = { specimenCounts: [2, 3], trials: 14 };
    const plain = drawSession(seedOf(5), abx, shape);
    const checked = drawSession(seedOf(5), abx, {
      ...shape,
      checks: { shape: checks, specimenCounts: [1, 2], trials: 12 },
    });
    const { kinds, checkSpecimens, ...rest } = checked;
    expect(rest).toEqual(plain);
    expect(plain).not.toHaveProperty('kinds');
    expect(kinds).toHaveLength(12);
    expect(checkSpecimens).toHaveLength(2);
  });

  it('come out as in the vector of the specification [S84]', () => {
    const spec = readFileSync('docs/spec/blind.md', 'utf8');
    const seed = drawSeed('000102030405060708090a0b0c0d0e0f101112131415161718191a1b1c1d1e1f', [
      '202122232425262728292a2b2c2d2e2f303132333435363738393a3b3c3d3e3f',
    ]);
    const kinds = drawKinds(seed, 8, { reference: 0, steps: [2, 1], same: 1 });
    const words = `${kinds.map((kind) => (stepOf(kind) === null ? kind : `step ${(stepOf(kind) ?? 0) + 1}`)).join(', ')}; specimen ${fairNumber(seed, 'check-specimen/1', 3)}`;
    expect(spec).toContain(`\`${words}\``);
  });
});

describe('what is fitted in a check trial', () => {
  const rows = ['111', '222', '333', '444'].map((code, cable) => ({ code, specimen: 's', serial: '', cable }));
  const stateWith = (reference: 0 | 1, ended: SessionState['ended'] = []) =>
    ({
      plan: { trials: 12, spares: 2, checks: { ...checks, reference } },
      ended,
    }) as unknown as Pick<SessionState, 'plan' | 'ended'>;
  const question = (id: keyof typeof methods, reference: 0 | 1) => ({
    ...{ secret, contributions: [], method: methods[id], rows, state: stateWith(reference) },
  });

  it.each(methodIds)('is the reference cable and the check cable of the step, in the same places, %s [S85]', (id) => {
    const method = methods[id];
    const draw = drawSession(drawSeed(secret, []), method, {
      specimenCounts: [1, 1],
      trials: 14,
      checks: { shape: checks, specimenCounts: [1, 1], trials: 12 },
    });
    for (const reference of [0, 1] as const) {
      for (let trial = 1; trial <= 12; trial += 1) {
        const truth = draw.truths[trial - 1] ?? '';
        const codes = method.presentations.map((presentation) =>
          codeFitted({ ...question(id, reference), trial, presentation }),
        );
        const places = method.presentations.map((presentation) => method.fitted(presentation, truth, draw.firstSide));
        const kind = kindOf(draw, stateWith(reference), trial);
        const step = stepOf(kind);
        const pair = kind === 'main' ? [0, 1] : [reference, step === null ? reference : 2 + step];
        expect(codes).toEqual(places.map((place) => rows[pair[place] ?? -1]?.code));
      }
    }
  });

  it('is drawn again for a spare, and its kind is that of the void trial [S86]', () => {
    const draw = drawSession(drawSeed(secret, []), abx, {
      specimenCounts: [1, 1],
      trials: 14,
      checks: { shape: checks, specimenCounts: [1, 1], trials: 12 },
    });
    const voided = (draw.kinds ?? []).indexOf('step/1') + 1;
    const ended = Array.from({ length: 12 }, (_, index) => ({
      ...{ trial: index + 1, outcome: index + 1 === voided ? 'void' : 'locked' },
    })) as unknown as SessionState['ended'];
    expect(kindOf(draw, stateWith(0, ended), 13)).toBe('step/1');
    const fitted = abx.presentations.map((presentation) =>
      codeFitted({ ...question('abx', 0), state: stateWith(0, ended), trial: 13, presentation }),
    );
    expect(new Set(fitted)).toEqual(new Set(['111', '444']));
  });

  it('is the same cable throughout where the same is compared with the same [S85]', () => {
    for (const place of [0, 1] as const) {
      expect(cableFitted(place, 'same', 1)).toBe(1);
      expect(cableFitted(place, 'main', 1)).toBe(place);
      expect(cableFitted(place, 'step/1', 1)).toBe(place === 0 ? 1 : 3);
    }
  });
});
