import { recordDecimal } from '../findings/record-decimal.ts';
import type { Method } from '../methods/method.ts';
import { holm } from '../statistics/holm.ts';
import { redrawTest } from '../statistics/redraw-test.ts';
import type { ContrastName } from './contrasts.ts';
import type { CueAuditResult, CueLine } from './cue-audit-result.ts';
import type { CueTrial } from './cue-trials.ts';
import { type Cue, cuesOf } from './cues.ts';
import { effectOf } from './effect.ts';
import { followsCues, ordersTried } from './follows-cue.ts';
import { labelsOf } from './labels.ts';
import { alternation, drawRepeats, followsPreviousTruth, type Pattern, truthZOf } from './patterns.ts';
import { type ScoreTable, scoreTables } from './score-tables.ts';

/** At most so often the audit finds something where nothing but the sound told anything. */
export const auditLevel = 0.05;

type Asked = Omit<CueLine, 'p' | 'adjusted' | 'isFound' | 'effect' | 'expected'> & {
  readonly p: number;
  readonly effect: number | null;
  readonly expected: number | null;
  /** For answers: whether they go with the cue further than with what was drawn. */
  readonly isBetter: boolean;
};

type Tried = { readonly table: ScoreTable; readonly p: number; readonly z: number };

/** The table that tells the most, its p adjusted for how many were asked by Bonferroni's inequality. */
function leastOf(tried: readonly Tried[]): Tried | null {
  const [first, ...others] = tried;
  if (first === undefined) return null;
  const least = others.reduce((one, other) => (other.p < one.p ? other : one), first);
  return { ...least, p: Math.min(1, least.p * tried.length) };
}

function lineOf(
  cue: Cue,
  question: CueLine['question'],
  { table: { contrast }, p, z }: Tried,
  study: { readonly trials: readonly CueTrial[]; readonly truthZ: number },
): Asked {
  return {
    cue: cue.id,
    question,
    contrast: contrast.name satisfies ContrastName,
    label: contrast.label,
    listener: null,
    p,
    effect: effectOf(cue, contrast, question, study.trials),
    expected: null,
    isBetter: question === 'truth' || Math.abs(z) > study.truthZ,
  };
}

function patternLine(cue: string, question: CueLine['question'], pattern: Pattern | null): Asked[] {
  if (pattern === null) return [];
  const { listener, p, observed, expected, z, truthZ } = pattern;
  const isBetter = question === 'truth' || Math.abs(z) > truthZ;
  return [{ cue, question, contrast: 'answer', label: null, listener, p, effect: observed, expected, isBetter }];
}

/** Whether the cues tell what was drawn: whole trials are drawn anew, everything else held. */
function truthLines(method: Method, trials: readonly CueTrial[], cues: readonly [Cue, ScoreTable[]][]): Asked[] {
  const drawn = trials.map(({ truth }) => method.truths.indexOf(truth));
  return cues.flatMap(([cue, tables]) => {
    const tried = tables.map((table) => {
      const { p } = redrawTest(table.byTruth.map((scores, index) => ({ scores, drawn: drawn[index] ?? 0 })));
      return { table, p, z: 0 };
    });
    const least = leastOf(tried);
    return least === null ? [] : [lineOf(cue, 'truth', least, { trials, truthZ: 0 })];
  });
}

/** Whether answers follow the cues: whole trials' answers in other orders, everything else held. */
function answerLines(
  method: Method,
  trials: readonly CueTrial[],
  cues: readonly [Cue, ScoreTable[]][],
  orders: number,
): Asked[] {
  const asked = cues
    .filter(([cue]) => cue.isBeforeAnswers)
    .flatMap(([cue, tables]) =>
      tables.flatMap((table) => (table.byLabel === null ? [] : [{ cue, table, scores: table.byLabel }])),
    );
  const labels = labelsOf(method);
  const counts = trials.map(({ answers }) =>
    labels.map((label) => answers.filter(({ choice }) => choice === label).length),
  );
  const sessions = [...new Set(trials.map(({ session }) => session))];
  const strata = sessions.map((session) => [...trials.keys()].filter((index) => trials[index]?.session === session));
  const followed = followsCues(
    asked.map(({ scores }) => scores),
    counts,
    strata,
    orders,
  );
  const truthZ = Math.abs(truthZOf(method, trials));
  return [...new Set(asked.map(({ cue }) => cue))].flatMap((cue) => {
    const tried = asked.flatMap(({ cue: own, table }, index) => {
      const { p, z } = followed[index] ?? { p: 1, z: 0 };
      return own === cue ? [{ table, p, z }] : [];
    });
    const least = leastOf(tried);
    return least === null ? [] : [lineOf(cue, 'answers', least, { trials, truthZ })];
  });
}

/**
 * Whether anything but the sound told what was drawn, or answers followed something else than what was drawn.
 *
 * Every cue of `cuesOf`, what was drawn before, and each listener's own answers before. Two questions of each: does it tell
 * what was drawn (the draw redrawn by whole trials, one draw for all listeners, everything else held fixed), and do answers
 * go with it, further than with what was drawn (answers of whole trials in other orders within their session). All p are
 * adjusted together by Holm's rule. It claims nothing and changes no figure.
 *
 * @param method the study's
 * @param trials every locked trial, in order
 * @param orders orders tried for the second question, at least 1
 * @returns a line for each cue and question, in a fixed order
 * @see redrawTest, followsCues, runsTest, binomialTest and holm for the sources
 */
export function cueAudit(method: Method, trials: readonly CueTrial[], orders = ordersTried): CueAuditResult {
  const cues = cuesOf(method, trials).map((cue): [Cue, ScoreTable[]] => [cue, scoreTables(method, cue, trials)]);
  const asked = [
    ...truthLines(method, trials, cues),
    ...patternLine('previous', 'truth', drawRepeats(method, trials)),
    ...answerLines(method, trials, cues, orders),
    ...patternLine('previous', 'answers', followsPreviousTruth(method, trials)),
    ...patternLine('alternation', 'answers', alternation(method, trials)),
  ];
  const adjusted = holm(asked.map(({ p }) => Math.min(1, p)));
  const least = 2 / labelsOf(method).length ** trials.length;
  return {
    version: 1,
    level: recordDecimal(auditLevel),
    trials: trials.length,
    orders,
    couldFind: asked.length > 0 && least * asked.length <= auditLevel,
    lines: asked.map(({ p, effect, expected, isBetter, ...line }, index) => ({
      ...line,
      p: recordDecimal(Math.min(1, p)),
      adjusted: recordDecimal(adjusted[index] ?? 1),
      isFound: isBetter && (adjusted[index] ?? 1) <= auditLevel,
      effect: effect === null ? null : recordDecimal(effect),
      expected: expected === null ? null : recordDecimal(expected),
    })),
  };
}
