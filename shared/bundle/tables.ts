import Papa from 'papaparse';
import type { Entry } from '../ledger/chain.ts';
import { answerName } from '../ledger/publication-parts.ts';
import type { StudyReading } from '../ledger/study-reading.ts';
import { truthOf } from '../session/fitting.ts';
import type { EndedTrial, SessionState } from '../session/state.ts';

/** A column with what it means; its name stands in the first row of the file. */
export type TableField = {
  readonly name: string;
  readonly type: 'string' | 'integer' | 'boolean' | 'datetime';
  readonly description: string;
};

export type Table = {
  readonly name: 'sessions' | 'trials' | 'answers' | 'listeners' | 'result';
  readonly title: string;
  readonly fields: readonly TableField[];
  readonly key: readonly string[];
  readonly rows: readonly (readonly (string | number | boolean)[])[];
};

type Cell = string | number | boolean;

const field = (name: string, type: TableField['type'], description: string): TableField => ({
  name,
  type,
  description,
});

const session = field('session', 'integer', 'Number of the session in the study, from 1.');
const trial = field('trial', 'integer', 'Number of the trial in its session, from 1.');
const listener = field('listener', 'string', 'Label of the listener in this study.');

/** Every table of a bundle, computed from the record and what it reveals, so that it can be compared byte for byte. */
export function tablesOf(study: StudyReading): Table[] {
  return [sessionsTable(study), trialsTable(study), answersTable(study), listenersTable(study), resultTable(study)];
}

/**
 * A table as a file: RFC 4180 with a first row of names, UTF-8, lines ended by CR and LF. A text that a spreadsheet would
 * take for a formula (it begins with =, +, - or @) is written with an apostrophe before it.
 *
 * @see RFC 4180, Common Format and MIME Type for Comma-Separated Values Files
 */
export function tableText({ fields, rows }: Table): string {
  const names = fields.map(({ name }) => name);
  return `${Papa.unparse({ fields: names, data: rows.map((row) => [...row]) }, { newline: '\r\n', escapeFormulae: /^[=+\-@\t\r]/ })}\r\n`;
}

const entriesOf = (study: StudyReading, number: number) =>
  study.entries().filter(({ payload }) => payload.session === number);

const atOf = (entries: readonly Entry[], kinds: readonly string[], trialNumber?: number): string =>
  entries.find(
    ({ kind, payload }) => kinds.includes(kind) && (trialNumber === undefined || payload.trial === trialNumber),
  )?.at ?? '';

function sessionsTable(study: StudyReading): Table {
  return {
    name: 'sessions',
    title: 'Every session of the study, abandoned and never-started ones too',
    fields: [
      session,
      field('phase', 'string', 'How it ended: finished, abandoned, or planned where it was never opened.'),
      field('opened', 'datetime', 'When seating opened, by the server’s clock; empty if never.'),
      field('ended', 'datetime', 'When it ended; empty if never opened.'),
      field('listeners', 'integer', 'Seats taken.'),
      field('trials_counted', 'integer', 'Locked trials.'),
      field('trials_void', 'integer', 'Trials set aside before they locked.'),
      field('first_side', 'string', 'The cable drawn for the first side (A in ABX); empty where nothing was drawn.'),
      field('reason', 'string', 'Why it was abandoned.'),
    ],
    key: ['session'],
    rows: study.sessions().map((state) => {
      const own = entriesOf(study, state.session);
      const locked = state.ended.filter(({ outcome }) => outcome === 'locked').length;
      const drawn = study.draws().find((draw) => draw.session === state.session);
      const abandoned = own.find(({ kind }) => kind === 'session-abandoned');
      return [
        state.session,
        state.phase,
        atOf(own, ['seating-opened']),
        atOf(own, ['session-finished', 'session-abandoned']),
        state.seats.length,
        locked,
        state.ended.length - locked,
        drawn === undefined ? '' : study.protocol().cables[drawn.firstSide].name,
        abandoned === undefined ? '' : String(abandoned.payload.reason),
      ];
    }),
  };
}

/** Truths of a session as its draw came out, by the number of the trial. */
const drawnIn = (study: StudyReading, state: SessionState) => {
  const draw = study.draws().find((candidate) => candidate.session === state.session);
  return (number: number) => (draw === undefined ? '' : truthOf(draw, number));
};

/** The answer that a truth makes right, or nothing for a method without right answers. */
function rightAnswer(study: StudyReading, truth: string): string {
  const method = study.method();
  const { isRight } = method.trials;
  if (isRight === null || truth === '') return '';
  return method.options(study.protocol().design).find(({ value }) => isRight(value, truth))?.value ?? '';
}

function trialsTable(study: StudyReading): Table {
  const rowOf = (state: SessionState, { trial: number, outcome, excerpt, voidReason }: EndedTrial): Cell[] => {
    const own = entriesOf(study, state.session);
    const truth = drawnIn(study, state)(number);
    const note = own.find(({ kind, payload }) => kind === 'trial-voided' && payload.trial === number)?.payload.note;
    return [
      state.session,
      number,
      outcome === 'locked' ? 'counted' : 'void',
      truth,
      rightAnswer(study, truth),
      state.plan.programme[excerpt]?.title ?? '',
      atOf(own, ['trial-opened'], number),
      atOf(own, ['trial-locked', 'trial-voided'], number),
      voidReason ?? '',
      note === undefined ? '' : String(note),
    ];
  };
  return {
    name: 'trials',
    title: 'Every trial that ended, in the order in which it was opened',
    fields: [
      session,
      trial,
      field('outcome', 'string', 'counted or void.'),
      field('drawn', 'string', 'What the draw said: the truth of the trial.'),
      field('right_answer', 'string', 'The answer that it made right; empty for a method without right answers.'),
      field('excerpt', 'string', 'What was played.'),
      field('opened', 'datetime', 'When it opened, by the server’s clock.'),
      field('ended', 'datetime', 'When it locked or was set aside.'),
      field('void_reason', 'string', 'Why it was set aside.'),
      field('void_note', 'string', 'What was noted about it.'),
    ],
    key: ['session', 'trial'],
    rows: study.sessions().flatMap((state) => state.ended.map((one) => rowOf(state, one))),
  };
}

function answersTable(study: StudyReading): Table {
  const held = new Map(study.answers().map((answer) => [answerName(answer), answer]));
  const rows = study.sessions().flatMap((state) =>
    state.ended
      .filter(({ outcome }) => outcome === 'locked')
      .flatMap(({ trial: number, seats }) =>
        seats.map((seat): Cell[] => {
          const answer = held.get(answerName({ session: state.sessionId, trial: number, seat }));
          const right = rightAnswer(study, drawnIn(study, state)(number));
          return [
            state.session,
            number,
            seat,
            answer?.choice ?? '',
            answer?.confidence ?? '',
            answer === undefined,
            right === '' ? '' : answer?.choice === right,
          ];
        }),
      ),
  );
  return {
    name: 'answers',
    title: 'Every answer that was due to a counted trial',
    fields: [
      session,
      trial,
      listener,
      field('answer', 'string', 'What was answered; empty when no answer came in time.'),
      field('confidence', 'string', 'How sure the listener was; empty where it was not asked or not said.'),
      field('missing', 'boolean', 'Whether no answer came in time.'),
      field(
        'right',
        'boolean',
        'Whether it was the right one; a missing one is not. Empty for a method without right answers.',
      ),
    ],
    key: ['session', 'trial', 'listener'],
    rows,
  };
}

function listenersTable(study: StudyReading): Table {
  const seats = study.sessions().flatMap((state) => state.seats.map((seat) => ({ ...seat, state })));
  const labels = [...new Set(seats.map(({ seat }) => seat))].sort();
  const locked = study.sessions().flatMap(({ ended }) => ended.filter(({ outcome }) => outcome === 'locked'));
  return {
    name: 'listeners',
    title: 'Every listener, by label',
    fields: [
      listener,
      field('sessions', 'integer', 'Sessions in which the listener took a seat.'),
      field('answers_due', 'integer', 'Answers due to counted trials.'),
      field('answers_missing', 'integer', 'Of these, how many did not come in time.'),
      field(
        'by_personal_link',
        'boolean',
        'Whether every seat was taken by a personal link, so that the label is one person.',
      ),
      field('left', 'boolean', 'Whether the listener left a session before its end.'),
    ],
    key: ['listener'],
    rows: labels.map((label) => {
      const own = seats.filter(({ seat }) => seat === label);
      return [
        label,
        own.length,
        locked.filter(({ seats: present }) => present.includes(label)).length,
        locked.filter(({ missing }) => missing.includes(label)).length,
        own.every(({ isLinked }) => isLinked),
        own.some(({ left }) => left),
      ];
    }),
  };
}

/** Every value of the registered result under its path, so that a program without JSON can compare. */
function resultTable(study: StudyReading): Table {
  const rows: Cell[][] = [];
  const walk = (value: unknown, path: string): void => {
    if (value === null) rows.push([path, '']);
    else if (typeof value === 'object')
      for (const [name, inner] of Object.entries(value)) walk(inner, path === '' ? name : `${path}/${name}`);
    else rows.push([path, value as Cell]);
  };
  walk(study.parts.result, '');
  return {
    name: 'result',
    title: 'The registered result as it stands on the record, value by value',
    fields: [
      field('path', 'string', 'Where the value stands in the result, names joined by slashes.'),
      field('value', 'string', 'The value: whole numbers, decimal text, words; empty for none.'),
    ],
    key: ['path'],
    rows,
  };
}
