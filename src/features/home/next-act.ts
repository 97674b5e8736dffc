import type { WaitingItem } from '#shared/contracts/users.ts';
import type { HomePlaces } from './home-places.ts';

type NextAct = { word: string; to: string };

/** What to do about a thing that waits, and where. */
export function nextActOf({ kind, studyId, sessionId }: WaitingItem, places: HomePlaces): NextAct {
  switch (kind) {
    case 'draft-to-finish':
      return { word: 'Finish the draft', to: places.editStudy(studyId) };
    case 'codes-to-draw':
      return { word: 'Draw the blind codes', to: places.codes(studyId) };
    case 'codes-to-confirm':
      return { word: 'Confirm the codes', to: places.codes(studyId) };
    case 'session-to-plan':
      return { word: 'Plan a session', to: places.planSession(studyId) };
    case 'session-to-run':
      return { word: 'Open the console', to: sessionId === null ? places.sessions : places.console(sessionId) };
    case 'levels-to-measure':
      return { word: 'Measure the levels', to: sessionId === null ? places.sessions : places.levels(sessionId) };
    case 'study-to-close':
      return { word: 'Close the study', to: places.study(studyId) };
    case 'report-to-read':
      return { word: 'Read the report', to: places.report(studyId) };
  }
}
