import { differentFigure } from '../findings/different-figure.ts';
import { runRegistered } from '../methods/run-registered.ts';
import { canonicalJson, type Json } from './canonical-json.ts';
import type { StudyReading } from './study-reading.ts';
import type { Verdict } from './verify.ts';

/** The registered analysis, run again on the answers and the draws, gives the result on the record. */
export function checkFigures(study: StudyReading): Verdict {
  const recorded = study.payloadOf('result-recorded')?.result;
  if (recorded === undefined) return { faults: ['No result is on the record.'], held: '' };
  if (canonicalJson(study.parts.result as Json) !== canonicalJson(recorded))
    return { faults: ['The result is not the one on the record.'], held: '' };
  const recomputed = runRegistered(study.protocol(), study.sessions(), study.secrets(), study.answers());
  const place = differentFigure(recorded, recomputed as unknown as Json);
  return {
    faults: place === null ? [] : [`Recomputed, ${place} differs from the result on the record.`],
    held: 'The registered analysis gives the recorded result: counts, fractions and p exactly, limits within 1e-9.',
  };
}
