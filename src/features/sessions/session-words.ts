import type { SessionRow } from '#shared/contracts/sessions.ts';

type PhaseWord = { word: string; tone: 'neutral' | 'held' | 'now' | 'amber' };

export const phaseWords: Record<SessionRow['phase'], PhaseWord> = {
  planned: { word: 'Planned', tone: 'neutral' },
  seating: { word: 'Seating', tone: 'now' },
  revealing: { word: 'Fixing the draw', tone: 'now' },
  running: { word: 'Running', tone: 'now' },
  finished: { word: 'Finished', tone: 'held' },
  abandoned: { word: 'Abandoned', tone: 'amber' },
};
