import type { CueTrial } from '#shared/cue-audit/cue-trials.ts';
import { cableAt } from '#shared/cue-audit/labels.ts';
import type { Method } from '#shared/methods/method.ts';
import { repeatableUniform } from '#shared/statistics/repeatable-uniform.ts';

/** What a simulated listener or proctor knows of a trial. */
export type Simulated = { readonly truth: string; readonly index: number; readonly firstSide: 0 | 1 };

export type Room = {
  readonly method: Method;
  readonly trials: number;
  readonly listeners: number;
  /** Whole milliseconds more that a step takes, at a place of a trial. */
  readonly longer?: (step: string, place: number, trial: Simulated) => number;
  readonly answersLater?: (trial: Simulated) => number;
  /** What a listener answers; fair guesses unless given. `slow` is how long fitting took at the last place. */
  readonly answer?: (trial: Simulated, uniform: () => number, fitMs: number) => string;
  /** All listeners of a trial lean the same way, so often. */
  readonly shared?: number;
};

/** Mean and spread of each step in seconds: whoever fits cables by hand is not a machine. */
const steps = { mute: [3, 0.7], unplug: [5, 1], fit: [6, 1], check: [3, 0.7] } as const;

/**
 * A session as a proctor would give it: every change ends at its registered length or up to four seconds later, steps
 * vary with a spread of about a second, skewed to the long side.
 */
export function simulatedSession(room: Room, seed: number): CueTrial[] {
  const { method, trials, listeners, longer, answersLater, shared = 0.5 } = room;
  const uniform = repeatableUniform(seed);
  const normal = () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform());
  const skewed = (mean: number, spread: number) => 1000 * mean * Math.exp((spread / mean) * normal());
  const pick = (of: readonly string[]) => of[Math.floor(uniform() * of.length)] ?? '';
  const options = method.options({}).map(({ value }) => value);
  const firstSide = uniform() < 0.5 ? 0 : 1;
  return Array.from({ length: trials }, (_, index) => {
    const truth = pick(method.truths);
    const known = { truth, index, firstSide } as const;
    const presentations = method.presentations.map((_name, place) => {
      const taken = Object.entries(steps).map(([step, [mean, spread]]): [string, number] => {
        const extra = longer === undefined ? 0 : longer(step, place, known);
        return [step, Math.round(skewed(mean, spread) + extra)];
      });
      const ready = taken.reduce((sum, [, ms]) => sum + ms, 0);
      return {
        steps: new Map(taken),
        ready,
        change: 30_000 + Math.round(uniform() * 4_000),
        listening: 12_000 + Math.round(uniform() * 20),
      };
    });
    const fitMs = presentations.at(-1)?.steps.get('fit') ?? 0;
    const leaning = pick(options);
    const answers = Array.from({ length: listeners }, (_unused, listener) => {
      const own = room.answer?.(known, uniform, fitMs) ?? (uniform() < shared * 2 - 1 ? leaning : pick(options));
      return { listener: `L${String(listener + 1).padStart(2, '0')}`, choice: own };
    });
    return {
      session: 1,
      trial: index + 1,
      position: index + 1,
      truth,
      firstSide,
      answers,
      presentations,
      gap: index === 0 ? null : Math.round(skewed(15, 6)),
      answering: Math.round(skewed(8, 3) + (answersLater?.(known) ?? 0)),
    };
  });
}

export const isFirstCable = (method: Method, place: number, { truth, firstSide }: Simulated) =>
  cableAt(method, place, truth, firstSide) === 0;
