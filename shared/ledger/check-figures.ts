import { runCueAudit } from '../cue-audit/run-cue-audit.ts';
import { differentFigure } from '../findings/different-figure.ts';
import { runChecks } from '../methods/run-checks.ts';
import { runRegistered } from '../methods/run-registered.ts';
import { canonicalJson, type Json } from './canonical-json.ts';
import type { StudyReading } from './study-reading.ts';
import type { Verdict } from './verify.ts';

/** Where what the check trials came to differs from what it comes to again. */
function placeInChecks(study: StudyReading): string | null {
  const recorded = study.payloadOf('result-recorded')?.checks ?? null;
  const recomputed = runChecks(study.protocol(), study.sessions(), study.secrets(), study.answers()) ?? null;
  const place = differentFigure(recorded, recomputed as unknown as Json);
  return place === null ? null : `checks/${place}`;
}

/** The registered analysis, run again on the answers and the draws, gives the result on the record. */
export function checkFigures(study: StudyReading): Verdict {
  const recorded = study.payloadOf('result-recorded')?.result;
  if (recorded === undefined) return { faults: ['No result is on the record.'], held: '' };
  if (canonicalJson(study.parts.result as Json) !== canonicalJson(recorded))
    return { faults: ['The result is not the one on the record.'], held: '' };
  const recomputed = runRegistered(study.protocol(), study.sessions(), study.secrets(), study.answers());
  const place = differentFigure(recorded, recomputed as unknown as Json) ?? placeInChecks(study);
  const faults = place === null ? [] : [`Recomputed, ${place} differs from the result on the record.`];
  return {
    faults: [...faults, ...cueFaults(study)],
    held: 'The registered analysis gives the recorded result: counts, fractions and p exactly, limits within 1e-9.',
  };
}

/** The cue audit, made again, is the one on the record; a study closed before there was one has none. */
function cueFaults(study: StudyReading): string[] {
  const recorded = study.payloadOf('result-recorded')?.cues;
  if (recorded === undefined) return [];
  const again = runCueAudit(
    study.protocol(),
    study.sessions(),
    study.entries(),
    study.secrets(),
    study.answers(),
    study.requests(),
  );
  const place = differentFigure(recorded as Json, again as unknown as Json);
  return place === null ? [] : [`Made again, ${place} of the cue audit differs from the record.`];
}
