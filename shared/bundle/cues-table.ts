import { cueAuditResult } from '../cue-audit/cue-audit-result.ts';
import { read, type StudyReading } from '../ledger/study-reading.ts';
import type { Table } from './tables.ts';

/** The cue audit line by line; no table where the record has none, as in studies closed before there was one. */
export function cuesTable(study: StudyReading): Table[] {
  const recorded = study.payloadOf('result-recorded')?.cues;
  if (recorded === undefined) return [];
  const cues = read('The cue audit', cueAuditResult, recorded);
  const field = (name: string, type: 'string' | 'boolean', description: string) => ({ name, type, description });
  return [
    {
      name: 'cues',
      title: 'The cue audit: whether anything but the sound told what was drawn, or answers went with it',
      fields: [
        field('cue', 'string', 'What could have told: a step of a change, a pause, a place, a pattern.'),
        field('question', 'string', 'truth: does it tell what was drawn? answers: do answers go with it?'),
        field('contrast', 'string', 'By the answer called for, by the cable fitted, or by whether the cable changed.'),
        field('label', 'string', 'Which answer against the others, where there are more than two.'),
        field('listener', 'string', 'Whose answers, where they are looked at one by one.'),
        field('p', 'string', 'Of this line alone, two-sided.'),
        field('adjusted_p', 'string', 'The same by Holm’s rule over all lines.'),
        field('found', 'boolean', 'Whether a caution stands beside the finding for it.'),
        field('effect', 'string', 'Mean of one side less that of the other, in seconds or places; or how often.'),
        field('expected', 'string', 'How often by chance; empty where the effect is a difference of means.'),
      ],
      key: ['cue', 'question'],
      rows: cues.lines.map((line) => [
        line.cue,
        line.question,
        line.contrast,
        line.label ?? '',
        line.listener ?? '',
        line.p,
        line.adjusted,
        line.isFound,
        line.effect ?? '',
        line.expected ?? '',
      ]),
    },
  ];
}
