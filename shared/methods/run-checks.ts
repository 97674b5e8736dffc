import { countedRate } from '../findings/by-excerpt.ts';
import type { CheckResult, CheckStep } from '../findings/check-result.ts';
import { fixedSequence } from '../findings/fixed-sequence.ts';
import type { Protocol } from '../protocol/protocol.ts';
import type { ProtocolChecks } from '../protocol/protocol-checks.ts';
import { type HeldChoice, type LockedTrial, lockedTrials } from '../session/counted-trials.ts';
import type { RevealedKey } from '../session/revealed-key.ts';
import type { SessionState } from '../session/state.ts';
import { stepOf } from '../session/trial-kinds.ts';
import type { Method, ScoredTrial } from './method.ts';
import { methodOf } from './methods.ts';
import { analyseRegistered } from './run-registered.ts';

type Registered = Pick<Protocol, 'method' | 'analysis' | 'design'>;

/**
 * What the check trials of a study come to, apart from the registered result: a pure function of its sealed protocol and
 * its record.
 *
 * A step is held against the registered level by the method's own test: the exact one with own draws, one coin per trial
 * in a group. Steps are asked from the largest to the smallest, up to the first that is not heard (fixed sequence). Each
 * listener is held against it by their own answers, which face draws of their own; these are not adjusted for their
 * number and name nobody.
 *
 * @returns undefined where the protocol registers no check trials
 * @see fixedSequence for the source of the order
 */
export function runChecks(
  protocol: Protocol,
  states: readonly SessionState[],
  key: RevealedKey,
  held: readonly HeldChoice[],
): CheckResult | undefined {
  const { checks } = protocol;
  if (checks === undefined) return undefined;
  return checkResultOf({ ...protocol, checks }, lockedTrials(methodOf(protocol.method), states, key, held));
}

/** The same from the locked trials themselves, main ones and check trials. */
export function checkResultOf(
  protocol: Registered & { readonly checks: ProtocolChecks },
  locked: readonly LockedTrial[],
): CheckResult {
  const { checks, analysis } = protocol;
  const method = methodOf(protocol.method);
  const ladder = checks.steps.map(({ milliDb }, index) => ({
    milliDb,
    trials: locked.filter(({ kind }) => stepOf(kind) === index),
  }));
  const steps = stepsOf(protocol, method, ladder);
  const byListener = listenersIn(locked).map((listener) => {
    const own = ladder.map(({ milliDb, trials }) => ({ milliDb, trials: answeredBy(trials, listener) }));
    const found = stepsOf(protocol, method, own);
    return { listener, steps: found, sensitiveTo: smallestHeard(found) };
  });
  const passed = byListener.filter((one) => one.steps[0]?.isHeard === true).map(({ listener }) => listener);
  return {
    alpha: analysis.alpha,
    steps,
    sensitiveTo: smallestHeard(steps),
    byListener,
    same: sameOf(protocol, method, locked),
    ...(analysis.exclusions === 'none' ? {} : { second: secondOf(protocol, locked, passed) }),
  };
}

type Rung = { readonly milliDb: number; readonly trials: readonly ScoredTrial[] };

function stepsOf(registered: Registered, method: Method, ladder: readonly Rung[]): CheckStep[] {
  const found = ladder.map(({ milliDb, trials }) => ({ milliDb, trials, result: resultOf(registered, trials) }));
  const order = fixedSequence(found.map(({ result }) => result?.isSignificant ?? false));
  return found.map(({ milliDb, trials, result }, index) => ({
    milliDb,
    trials: trials.length,
    answers: result?.answers ?? 0,
    missing: result?.missing ?? 0,
    rates: method.trials.rates(['', '']).map(({ label, due }) => {
      const { counted, due: all, missing } = countedRate(label, trials.flatMap(due), true);
      return { label, counted, due: all, missing };
    }),
    test:
      result === null
        ? null
        : {
            name: result.test,
            p: result.p,
            leastAttainableP: result.leastAttainableP,
            canReachAlpha: result.canReachAlpha,
          },
    isHeard: order[index]?.holds ?? false,
    isAsked: order[index]?.isAsked ?? false,
  }));
}

/** The method's own test of some trials, without what is registered about the main ones alone. */
function resultOf(
  { method, analysis: { margin: _, ...analysis }, design }: Registered,
  trials: readonly ScoredTrial[],
) {
  if (trials.length === 0) return null;
  const { samplingFrame: __, ...plain } = design;
  return analyseRegistered({ method, analysis, design: plain }, trials);
}

const smallestHeard = (steps: readonly CheckStep[]) => steps.findLast(({ isHeard }) => isHeard)?.milliDb ?? null;

/** Everybody who had an answer due to any trial, by label. */
function listenersIn(trials: readonly ScoredTrial[]): string[] {
  return [...new Set(trials.flatMap(({ answers }) => answers.map(({ listener }) => listener)))].sort();
}

/** The trials that a listener took part in, with their answer alone. */
function answeredBy(trials: readonly ScoredTrial[], listener: string): ScoredTrial[] {
  return onlyOf(trials, (one) => one === listener);
}

/** Trials with the answers of some listeners; those in which none of them took part are left out. */
function onlyOf(trials: readonly ScoredTrial[], isKept: (listener: string) => boolean): ScoredTrial[] {
  return trials
    .map((trial) => ({ ...trial, answers: trial.answers.filter(({ listener }) => isKept(listener)) }))
    .filter(({ answers }) => answers.length > 0);
}

function sameOf({ design }: Registered, method: Method, locked: readonly LockedTrial[]): CheckResult['same'] {
  const trials = locked.filter(({ kind }) => kind === 'same');
  const choices = trials.flatMap(({ answers }) => answers.map(({ choice }) => choice));
  return {
    trials: trials.length,
    answers: choices.length,
    missing: choices.filter((choice) => choice === null).length,
    choices: method.options(design).map(({ value }) => ({
      choice: value,
      count: choices.filter((choice) => choice === value).length,
    })),
  };
}

/** Left out is whoever had an answer due and did not hear the largest step; check trials alone decide. */
function secondOf(registered: Registered, locked: readonly LockedTrial[], passed: readonly string[]) {
  const main = locked.filter(({ kind }) => kind === 'main');
  const kept = onlyOf(main, (listener) => passed.includes(listener));
  return {
    excluded: listenersIn(main).filter((listener) => !passed.includes(listener)),
    result: kept.length === 0 ? null : analyseRegistered(registered, kept),
  };
}
