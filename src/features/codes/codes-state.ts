import type { CodesStatus } from '#shared/contracts/codes.ts';

export const codesStateWords: Record<CodesStatus['state'], { word: string; tone: 'neutral' | 'amber' | 'held' }> = {
  none: { word: 'Not drawn yet', tone: 'neutral' },
  drawn: { word: 'Drawn, not confirmed yet', tone: 'amber' },
  confirmed: { word: 'Sleeved and coded', tone: 'held' },
};

export const purposeWords: Record<string, string> = {
  labels: 'to print the labels',
  check: 'to check the specimens',
};
