import { methodOf } from '../methods/methods.ts';
import type { Protocol } from '../protocol/protocol.ts';
import type { HeldChoice } from '../session/counted-trials.ts';
import type { RequestContent } from '../session/request-leaf.ts';
import type { RevealedKey } from '../session/revealed-key.ts';
import type { SessionState } from '../session/state.ts';
import { cueAudit } from './cue-audit.ts';
import type { CueAuditResult } from './cue-audit-result.ts';
import { cueTrials, type TimedEntry } from './cue-trials.ts';

/** The cue audit of a closed study: a pure function of its sealed protocol, its record and the answers beside it. */
export function runCueAudit(
  protocol: Pick<Protocol, 'method'>,
  states: readonly SessionState[],
  entries: readonly TimedEntry[],
  key: RevealedKey,
  held: readonly HeldChoice[],
  requests: readonly RequestContent[] = [],
): CueAuditResult {
  const method = methodOf(protocol.method);
  return cueAudit(method, cueTrials(method, states, entries, key, held, requests));
}
