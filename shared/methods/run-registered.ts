import type { Protocol } from '../protocol/protocol.ts';
import { countedTrials, type HeldChoice } from '../session/counted-trials.ts';
import type { RevealedKey } from '../session/revealed-key.ts';
import type { SessionState } from '../session/state.ts';
import type { ScoredTrial } from './method.ts';
import { methodOf, type RegisteredResult } from './methods.ts';

/**
 * The registered analysis of a study: a pure function of its sealed protocol and its record.
 *
 * @throws RangeError when the protocol registers an analysis that this version does not have
 */
export function runRegistered(
  protocol: Protocol,
  states: readonly SessionState[],
  key: RevealedKey,
  held: readonly HeldChoice[],
): RegisteredResult {
  return analyseRegistered(protocol, countedTrials(methodOf(protocol.method), states, key, held));
}

/**
 * The registered analysis of some trials.
 *
 * @throws RangeError when the protocol registers an analysis that this version does not have
 */
export function analyseRegistered(
  { method: id, analysis, design }: Pick<Protocol, 'method' | 'analysis' | 'design'>,
  trials: readonly ScoredTrial[],
): RegisteredResult {
  const method = methodOf(id);
  const { name } = method.registered(design);
  if (analysis.name !== name) throw new RangeError(`the protocol registers ${analysis.name}; this version has ${name}`);
  return method.analyse(
    {
      analysis,
      listenersPerSession: design.listenersPerSession,
      attribute: design.attribute,
      samplingFrame: design.samplingFrame,
    },
    trials,
  );
}
