import { methodOf } from '#shared/methods/methods.ts';
import { type PowerCurve, plannedDetectableRate, plannedPowerCurve } from '#shared/statistics/planned-power.ts';
import type { SampleSize } from '#shared/statistics/sample-size.ts';

export type SearchAsked = {
  method: string;
  /** Over all sessions. */
  trials: number;
  alpha: number;
  /** Who answer each trial; with more than one the power is simulated instead. */
  listeners: number;
  /** The rate to be found, and how often. */
  rate: number;
  goal: number;
  /** The registered margin, or the one that is spoken of while none is. */
  marginPercent: number;
};

type Numbers = Pick<SampleSize, 'nFirst' | 'nSafe'>;

/** What takes longer to find than a keystroke may take. */
export type SearchFound = {
  /** What was asked, so that words about an answer are true whatever has been typed since. */
  asked: SearchAsked;
  /** Of answers that each have a draw of their own; null for a group. */
  own: {
    /** At the rate to be found, and at a small, a middling and a large effect. */
    power: { rate: number; power: number }[];
    needed: Numbers;
    curve: PowerCurve;
    /** How many trials find a small effect. */
    neededForSmall: Numbers;
    /** What a study that found nothing could have found with 80 % power. */
    detectable: number | null;
  } | null;
  /** How many show the margin when there is nothing; null where the method takes none, and for a group's trials. */
  marginNeeded: Numbers | null;
};

/** The power by which a report says what a test could have found. */
export const detectablePower = 0.8;

/** Pure, and the same for the same question; it runs in a worker, because some searches take a second. */
export function searchPlan(asked: SearchAsked): SearchFound {
  const { planned, margin } = methodOf(asked.method);
  const { trials, alpha, rate, goal, listeners } = asked;
  const isGroup = listeners > 1;
  const isSimulated = isGroup && margin?.counts === 'trials';
  const marginNeeded = planned.margin === null || isSimulated ? null : planned.margin.needed(asked.marginPercent / 100);
  if (isGroup) return { asked, own: null, marginNeeded };
  const needed = planned.needed(alpha, rate, goal);
  const [small] = planned.rates;
  return {
    asked,
    own: {
      power: [rate, ...planned.rates].map((at) => ({ rate: at, power: planned.power(trials, alpha, at) })),
      needed,
      curve: plannedPowerCurve(planned, { trials, alpha, rate, ...needed }),
      neededForSmall: planned.needed(alpha, small, goal),
      detectable: plannedDetectableRate(planned, trials, alpha, detectablePower),
    },
    marginNeeded,
  };
}
