import { labelFaults, listenersToldApart, toldApartWords } from '../session/listeners-told-apart.ts';
import type { StudyReading } from './study-reading.ts';
import type { Verdict } from './verify.ts';

/** Every label stands for one listener, as far as the record can show it; it says how many joined by code alone. */
export function checkListeners(study: StudyReading): Verdict {
  const sessions = study.sessions();
  return { faults: labelFaults(sessions), held: toldApartWords(listenersToldApart(sessions)) };
}
