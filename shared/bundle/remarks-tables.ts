import type { StudyReading } from '../ledger/study-reading.ts';
import type { Table } from './tables.ts';

const field = (name: string, type: 'string' | 'integer', description: string) => ({ name, type, description });

/** What listeners said beside the trials, by label, all of it; no table where nobody said anything. */
export function remarksTables(study: StudyReading): Table[] {
  const remarks = study.remarks();
  if (remarks.length === 0) return [];
  const numbers = new Map(study.sessions().map(({ session, sessionId }) => [sessionId, session]));
  return [
    {
      name: 'remarks',
      title: 'What listeners said after the last trial, and how tired they were at breaks',
      fields: [
        field('session', 'integer', 'Number of the session in the study, from 1.'),
        field('listener', 'string', 'Label of the listener in this study.'),
        field('about', 'string', 'exit, or a break by its number: break/1.'),
        field('went_by', 'string', 'What the listener went by, in their words.'),
        field('noticed', 'string', 'Whether anything but the music was heard, seen or felt: yes, no, or empty.'),
        field('what', 'string', 'What that was.'),
        field('guesses', 'string', 'What the listener thought the cables were, in the order asked, joined by " | ".'),
        field('fatigue', 'string', 'At a break: fresh, all right or tired.'),
      ],
      key: ['session', 'listener', 'about'],
      rows: remarks.map(({ session, seat, about, said }) => {
        const start = [numbers.get(session) ?? 0, seat, about];
        return 'fatigue' in said
          ? [...start, '', '', '', '', said.fatigue]
          : [...start, said.wentBy, said.noticed ?? '', said.what, said.guesses.join(' | '), ''];
      }),
    },
  ];
}
