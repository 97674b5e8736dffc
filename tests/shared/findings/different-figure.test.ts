import { describe, expect, it } from 'vitest';
import { differentFigure } from '#shared/findings/different-figure.ts';

const recorded = {
  correct: 12,
  method: 'abx',
  p: { numerator: '2517', denominator: '65536', value: '0.0384063720703' },
  byListener: [
    { listener: 'L01', holmP: '0.0384063720703', interval: { lower: '0.476230264771', upper: '0.927267234400' } },
  ],
  dPrime: { limit: 'Infinity', lower: '1.79000000001' },
};

describe('two results, figure by figure', () => {
  it('takes limits and d′ within 1e-9, since engines differ in the last digits [V4]', () => {
    const near = structuredClone(recorded);
    near.dPrime.lower = '1.79000000002';
    near.byListener[0] = {
      ...recorded.byListener[0],
      interval: { lower: '0.476230264772', upper: '0.927267234399' },
    } as never;
    expect(differentFigure(recorded, near)).toBeNull();
    near.dPrime.lower = '1.79000001001';
    expect(differentFigure(recorded, near)).toBe('dPrime/lower');
  });

  it.each([
    ['a count', { correct: 13 }, 'correct'],
    ['a word', { method: 'abz' }, 'method'],
    ['a fraction', { p: { ...recorded.p, numerator: '2518' } }, 'p/numerator'],
    ['the last figure of p', { p: { ...recorded.p, value: '0.0384063720704' } }, 'p/value'],
    [
      'the last figure of an adjusted p',
      { byListener: [{ ...recorded.byListener[0], holmP: '0.0384063720704' }] },
      'byListener/0/holmP',
    ],
    ['a limit that exists', { dPrime: { limit: '3.5', lower: '1.79000000001' } }, 'dPrime/limit'],
    ['one listener more', { byListener: [...recorded.byListener, ...recorded.byListener] }, 'byListener'],
    ['a field more', { extra: 1 }, 'extra'],
  ])('takes %s exactly [V4]', (_what, change, place) => {
    expect(differentFigure(recorded, { ...recorded, ...change })).toBe(place);
  });
});
