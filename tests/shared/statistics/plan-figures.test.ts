import { describe, expect, it } from 'vitest';
import { evenChance } from '#shared/statistics/chance.ts';
import { planFigures, type StudyPlan } from '#shared/statistics/plan-figures.ts';
import { oneSidedPlan } from '#shared/statistics/planned-test.ts';

const plan: StudyPlan = {
  sessions: 1,
  trials: 16,
  alpha: '0.05',
  listeners: 1,
  presentationsPerTrial: 3,
  test: oneSidedPlan(evenChance),
  changeMs: 30_000,
  listenMs: 20_000,
  answerMs: 15_000,
  resetMs: 0,
  breaks: null,
};

describe('what the planner shows', () => {
  // Three fittings of 30 s and 20 s of listening, and 15 s to answer: 165 s; 16 of them 44 min; A and B first, 100 s.
  it('adds up fittings and minutes of a session [T22]', () => {
    expect(planFigures(plan).session).toEqual({
      fittings: 50,
      familiarisationMs: 100_000,
      trialMs: 165_000,
      breaksMs: 0,
      durationMs: 2_740_000,
      durationMinutes: 46,
    });
  });

  it('takes no reset and no break after the last trial [T22]', () => {
    const ten = { everyTrials: 8, lengthMs: 600_000 };
    const { session } = planFigures({ ...plan, resetMs: 1000, breaks: ten });
    expect(session.breaksMs).toBe(600_000);
    expect(session.durationMs).toBe(2_740_000 + 15 * 1000 + 600_000);
    expect(planFigures({ ...plan, trials: 17, breaks: ten }).session.breaksMs).toBe(1_200_000);
  });

  // R: pbinom(11, 16, c(.5, .6, .7, .8), lower.tail = FALSE)
  it('shows the number to reach, its true size and the power at .6, .7 and .8 [T22]', () => {
    const { critical, chance } = planFigures(plan);
    const { rates, power } = plan.test;
    expect(chance).toBe(0.5);
    expect(critical).toMatchObject({ count: 12 });
    expect(critical?.attainedSize).toBeCloseTo(2517 / 65536, 14);
    expect(rates.map((rate) => [rate, Number(power(16, 0.05, rate).toFixed(4))])).toEqual([
      [0.6, 0.1666],
      [0.7, 0.4499],
      [0.8, 0.7982],
    ]);
  });

  it('pools the trials of all sessions in the test, and one session in the minutes [T22]', () => {
    const figures = planFigures({ ...plan, sessions: 3 });
    expect(figures.trialsInAll).toBe(48);
    expect(figures.critical?.count).toBe(31);
    expect(figures.session.fittings).toBe(50);
  });

  // 2^-8 = 1/256: no number of listeners makes p smaller than one over the number of draws.
  it('shows the least p that shared presentations allow, and promises a group no number [T22]', () => {
    const group = planFigures({ ...plan, trials: 8, listeners: 16, alpha: '0.001' });
    expect(group).toMatchObject({ leastAttainableP: 1 / 256, canReachAlpha: false, isCriticalCountBinding: false });
    expect(planFigures({ ...plan, trials: 4, alpha: '0.0625' })).toMatchObject({
      canReachAlpha: true,
      isCriticalCountBinding: true,
      critical: { count: 4 },
    });
  });
});
