import Papa from 'papaparse';
import type { Entry } from '../ledger/chain.ts';
import { answerName } from '../ledger/publication-parts.ts';
import type { StudyReading } from '../ledger/study-reading.ts';
import { levelsTables } from '../levels/levels-table.ts';
import { kindOf, truthOf } from '../session/fitting.ts';
import type { EndedTrial, SessionState } from '../session/state.ts';
import { stepOf, type TrialKind } from '../session/trial-kinds.ts';
import { cuesTable } from './cues-table.ts';
import { remarksTables } from './remarks-tables.ts';

/** A column with what it means; its name stands in the first row of the file. */
export type TableField = {
  readonly name: string;
  readonly type: 'string' | 'integer' | 'boolean' | 'datetime';
  readonly description: string;
};

export type Table = {
  readonly name:
    | 'sessions'
    | 'trials'
    | 'answers'
    | 'listeners'
    | 'requests'
    | 'result'
    | 'levels'
    | 'cues'
    | 'remarks'
    | 'checks';
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
  return [
    sessionsTable(study),
    trialsTable(study),
    answersTable(study),
    listenersTable(study),
    ...(study.requests().length === 0 ? [] : [requestsTable(study)]),
    resultTable(study),
    ...levelsTables(study),
    ...cuesTable(study),
    ...remarksTables(study),
    ...(study.protocol().checks === undefined ? [] : [checksTable(study)]),
  ];
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

/** When things happened in each session and trial, and what was noted: one pass over the record. */
function happenings(study: StudyReading) {
  const seen = new Map<string, Entry>();
  const named = (kind: string, session: unknown, trial: unknown) => `${kind} ${session} ${trial ?? ''}`;
  for (const entry of study.entries()) {
    const { session, trial } = entry.payload;
    for (const name of [named(entry.kind, session, trial), named(entry.kind, session, undefined)])
      if (!seen.has(name)) seen.set(name, entry);
  }
  return (kind: string, session: number, trial?: number) => seen.get(named(kind, session, trial));
}

type Truths = (state: SessionState, trial: number) => string;

/** What each trial was; every one a main one where no check trials are registered. */
function drawnKinds(study: StudyReading): (state: SessionState, trial: number) => TrialKind {
  const draws = new Map(study.draws().map((draw) => [draw.session, draw]));
  return (state, trial) => {
    const draw = draws.get(state.session);
    return draw === undefined ? 'main' : kindOf(draw, state, trial);
  };
}

const kindField = field(
  'kind',
  'string',
  'main, check (a known difference) or same (the reference cable with itself).',
);

const wordOf = (kind: TrialKind) => (stepOf(kind) === null ? kind : 'check');

/** Truths as the draws came out; nothing where there was no draw. */
function drawnTruths(study: StudyReading): Truths {
  const draws = new Map(study.draws().map((draw) => [draw.session, draw]));
  return ({ session: number }, trial) => {
    const draw = draws.get(number);
    return draw === undefined ? '' : truthOf(draw, trial);
  };
}

function sessionsTable(study: StudyReading): Table {
  const first = happenings(study);
  const draws = new Map(study.draws().map((draw) => [draw.session, draw]));
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
      const locked = state.ended.filter(({ outcome }) => outcome === 'locked').length;
      const drawn = draws.get(state.session);
      const abandoned = first('session-abandoned', state.session);
      return [
        state.session,
        state.phase,
        first('seating-opened', state.session)?.at ?? '',
        (first('session-finished', state.session) ?? abandoned)?.at ?? '',
        state.seats.length,
        locked,
        state.ended.length - locked,
        drawn === undefined ? '' : study.protocol().cables[drawn.firstSide].name,
        abandoned === undefined ? '' : String(abandoned.payload.reason),
      ];
    }),
  };
}

/** The answer that a truth makes right, or nothing for a method without right answers. */
function rightAnswer(study: StudyReading, truth: string): string {
  const method = study.method();
  const { isRight } = method.trials;
  if (isRight === null || truth === '') return '';
  return method.options(study.protocol().design).find(({ value }) => isRight(value, truth))?.value ?? '';
}

function trialsTable(study: StudyReading): Table {
  const first = happenings(study);
  const truths = drawnTruths(study);
  const kinds = drawnKinds(study);
  const { checks } = study.protocol();
  const rowOf = (state: SessionState, { trial: number, outcome, excerpt, voidReason }: EndedTrial): Cell[] => {
    const truth = truths(state, number);
    const kind = kinds(state, number);
    const voided = first('trial-voided', state.session, number);
    const note = voided?.payload.note;
    return [
      state.session,
      number,
      outcome === 'locked' ? 'counted' : 'void',
      truth,
      kind === 'same' ? '' : rightAnswer(study, truth),
      state.plan.programme[excerpt]?.title ?? '',
      first('trial-opened', state.session, number)?.at ?? '',
      (first('trial-locked', state.session, number) ?? voided)?.at ?? '',
      voidReason ?? '',
      note === undefined ? '' : String(note),
      ...(checks === undefined ? [] : [wordOf(kind), checks.steps[stepOf(kind) ?? -1]?.milliDb ?? '']),
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
      ...(checks === undefined
        ? []
        : [
            kindField,
            field('step_mdb', 'integer', 'Size of the known difference in thousandths of a decibel; empty otherwise.'),
          ]),
    ],
    key: ['session', 'trial'],
    rows: study.sessions().flatMap((state) => state.ended.map((one) => rowOf(state, one))),
  };
}

function answersTable(study: StudyReading): Table {
  const truths = drawnTruths(study);
  const kinds = drawnKinds(study);
  const hasChecks = study.protocol().checks !== undefined;
  const held = new Map(study.answers().map((answer) => [answerName(answer), answer]));
  const rows = study.sessions().flatMap((state) =>
    state.ended
      .filter(({ outcome }) => outcome === 'locked')
      .flatMap(({ trial: number, seats }) =>
        seats.map((seat): Cell[] => {
          const answer = held.get(answerName({ session: state.sessionId, trial: number, seat }));
          const kind = kinds(state, number);
          const right = kind === 'same' ? '' : rightAnswer(study, truths(state, number));
          return [
            state.session,
            number,
            seat,
            answer?.choice ?? '',
            answer?.confidence ?? '',
            answer === undefined,
            right === '' ? '' : answer?.choice === right,
            ...(hasChecks ? [wordOf(kind)] : []),
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
      ...(hasChecks ? [kindField] : []),
    ],
    key: ['session', 'trial', 'listener'],
    rows,
  };
}

/** There only where a single listener asked for what was presented. */
function requestsTable(study: StudyReading): Table {
  const asked = new Map(
    study
      .entries()
      .filter(({ kind }) => kind === 'presentation-requested')
      .map(({ at, payload }) => [`${payload.session} ${payload.trial} ${payload.presentation}`, at]),
  );
  return {
    name: 'requests',
    title: 'Every presentation that was asked for, void trials included',
    fields: [
      session,
      trial,
      field('presentation', 'integer', 'Place of the presentation in its trial, from 1.'),
      listener,
      field('asked_for', 'string', 'The label that was asked for.'),
      field('asked', 'datetime', 'When it was asked for, by the server’s clock.'),
    ],
    key: ['session', 'trial', 'presentation'],
    rows: study.sessions().flatMap(({ session: number, sessionId }) =>
      study
        .requests()
        .filter((one) => one.session === sessionId)
        .map((one): Cell[] => [
          number,
          one.trial,
          one.presentation + 1,
          one.seat,
          one.label,
          asked.get(`${number} ${one.trial} ${one.presentation}`) ?? '',
        ]),
    ),
  };
}

type OfListener = { sessions: number; due: number; missing: number; isLinked: boolean; left: boolean };

function listenersTable(study: StudyReading): Table {
  const listeners = new Map<string, OfListener>();
  const of = (label: string): OfListener => {
    const known = listeners.get(label) ?? { sessions: 0, due: 0, missing: 0, isLinked: true, left: false };
    listeners.set(label, known);
    return known;
  };
  for (const { seats, ended } of study.sessions()) {
    for (const { seat, isLinked, left } of seats) {
      const own = of(seat);
      own.sessions += 1;
      own.isLinked &&= isLinked;
      own.left ||= left;
    }
    for (const trial of ended.filter(({ outcome }) => outcome === 'locked')) {
      for (const seat of trial.seats) of(seat).due += 1;
      for (const seat of trial.missing) of(seat).missing += 1;
    }
  }
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
    rows: [...listeners.keys()].sort().map((label) => {
      const { sessions, due, missing, isLinked, left } = of(label);
      return [label, sessions, due, missing, isLinked, left];
    }),
  };
}

/** Every value of what the check trials came to, in the same form. */
function checksTable(study: StudyReading): Table {
  return {
    ...resultTable(study),
    name: 'checks',
    title: 'What the check trials came to, as it stands on the record, value by value',
    rows: valuesOf(study.payloadOf('result-recorded')?.checks ?? null),
  };
}

/** Every value under its path, so that a program without JSON can compare. */
function valuesOf(whole: unknown): Cell[][] {
  const rows: Cell[][] = [];
  const walk = (value: unknown, path: string): void => {
    if (value === null) rows.push([path, '']);
    else if (typeof value === 'object')
      for (const [name, inner] of Object.entries(value)) walk(inner, path === '' ? name : `${path}/${name}`);
    else rows.push([path, value as Cell]);
  };
  walk(whole, '');
  return rows;
}

function resultTable(study: StudyReading): Table {
  return {
    name: 'result',
    title: 'The registered result as it stands on the record, value by value',
    fields: [
      field('path', 'string', 'Where the value stands in the result, names joined by slashes.'),
      field('value', 'string', 'The value: whole numbers, decimal text, words; empty for none.'),
    ],
    key: ['path'],
    rows: valuesOf(study.parts.result),
  };
}
