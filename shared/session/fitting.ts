import type { Method } from '../methods/method.ts';
import type { CodeKeyRow } from './commitments.ts';
import { type Draw, drawSeed, drawSession } from './draw.ts';
import type { SessionPlan } from './events.ts';
import { fairNumber } from './fair-number.ts';
import type { Practice } from './practice.ts';
import { standsFor } from './progress.ts';
import type { SessionState } from './state.ts';
import { cableFitted, firstCheckCable, type TrialKind, trialKind } from './trial-kinds.ts';

export type DrawnSession = {
  readonly secret: string;
  readonly contributions: readonly string[];
  readonly method: Method;
  readonly plan: Pick<SessionPlan, 'trials' | 'spares' | 'checks' | 'separateSpecimens'>;
  readonly rows: readonly CodeKeyRow[];
};

const rowsOfCable = (rows: readonly CodeKeyRow[], cable: number) => rows.filter((row) => row.cable === cable);

/** A session's draw from its secret, its contributions and the study's code key. */
export function drawOf({ secret, contributions, method, plan, rows }: DrawnSession): Draw {
  const { trials, spares, checks, separateSpecimens } = plan;
  const specimensOf = (cable: number) => rowsOfCable(rows, cable).length;
  return drawSession(drawSeed(secret, contributions), method, {
    specimenCounts: [specimensOf(0), specimensOf(1)],
    trials: trials + spares,
    isSeparate: separateSpecimens === true,
    ...(checks === undefined
      ? {}
      : {
          checks: {
            shape: checks,
            specimenCounts: checks.steps.map((_, step) => specimensOf(firstCheckCable + step)),
            trials,
          },
        }),
  });
}

/** The truth of a trial; the familiarisation trial (0) has none. */
export function truthOf(draw: Draw, trial: number): string {
  const truth = draw.truths[trial - 1];
  if (truth === undefined) throw new RangeError(`trial ${trial} is not in the draw`);
  return truth;
}

/** What a trial is; a spare is what the void trial was that it stands for. The familiarisation trial (0) is a main one. */
export function kindOf(
  draw: Pick<Draw, 'kinds'>,
  state: Pick<SessionState, 'plan' | 'ended'>,
  trial: number,
): TrialKind {
  if (draw.kinds === undefined || trial === 0) return 'main';
  const kind = draw.kinds[standsFor(state, trial) - 1];
  if (kind === undefined) throw new RangeError(`trial ${trial} is not in the draw`);
  return kind;
}

/** The truth of a practice trial: fair, and under a label of its own, so that telling it tells nothing of another. */
export function truthOfPractice({ secret, contributions, method }: DrawnSession, { number }: Practice): string {
  const truth = method.truths[fairNumber(drawSeed(secret, contributions), `practice/${number}`, method.truths.length)];
  if (truth === undefined) throw new RangeError('a method needs at least one truth');
  return truth;
}

/** What is practised: a known difference, or the two cables of the question. */
const kindOfPractice = ({ step }: Practice): TrialKind => (step === null ? 'main' : trialKind.parse(`step/${step}`));

type Presented = {
  readonly method: Method;
  readonly state: Pick<SessionState, 'plan' | 'ended'>;
  readonly trial: number;
  readonly presentation: string;
};

/** What a trial presents: its truth, null in the familiarisation trial, and what it is. */
type Truth = { readonly truth: string | null; readonly kind: TrialKind };

/** What a draw puts at a presentation: the cable by its place in the code key, and the place of its specimen. */
export function fittedBy(draw: Draw, presented: Presented) {
  const { state, trial } = presented;
  const truth = trial === 0 ? null : truthOf(draw, trial);
  return placeOf(draw, presented, { truth, kind: kindOf(draw, state, trial) });
}

function placeOf(draw: Draw, { method, state, trial, presentation }: Presented, { truth, kind }: Truth) {
  const place = method.fitted(presentation, truth, draw.firstSide);
  const cable = cableFitted(place, kind, state.plan.checks?.reference ?? 0);
  const deal = draw.separate?.deals?.[trial - 1] ?? 0;
  const isOther = draw.separate !== undefined && method.separate?.specimen(presentation, truth, deal) === 1;
  const specimens = [...draw.specimens, ...(draw.checkSpecimens ?? [])];
  return { cable, specimen: isOther ? (draw.separate?.specimen ?? 0) : (specimens[cable] ?? -1) };
}

export type FittingQuestion = Omit<DrawnSession, 'plan'> &
  Presented & {
    /** The practice trial that it is in; left out or null in any other. */
    readonly practice?: Practice | null;
  };

/** The blind code to be fitted for a presentation of a trial. */
export function codeFitted(question: FittingQuestion): string {
  const { practice = null, state } = question;
  const drawn: DrawnSession = { ...question, plan: state.plan };
  const draw = drawOf(drawn);
  const { cable, specimen } =
    practice === null
      ? fittedBy(draw, question)
      : placeOf(draw, question, { truth: truthOfPractice(drawn, practice), kind: kindOfPractice(practice) });
  const row = rowsOfCable(question.rows, cable)[specimen];
  if (row === undefined) throw new RangeError('the code key has no such specimen');
  return row.code;
}
