import type { Method } from '../methods/method.ts';
import type { CodeKeyRow } from './commitments.ts';
import { type Draw, drawSeed, drawSession } from './draw.ts';

export type DrawnSession = {
  readonly secret: string;
  readonly contributions: readonly string[];
  readonly method: Method;
  readonly trials: number;
  readonly rows: readonly CodeKeyRow[];
  /** Whether the protocol registers separate specimens. */
  readonly isSeparate: boolean;
};

const rowsOfCable = (rows: readonly CodeKeyRow[], cable: number) => rows.filter((row) => row.cable === cable);

/** A session's draw from its secret, its contributions and the study's code key. */
export function drawOf({ secret, contributions, method, trials, rows, isSeparate }: DrawnSession): Draw {
  return drawSession(drawSeed(secret, contributions), method, {
    specimenCounts: [rowsOfCable(rows, 0).length, rowsOfCable(rows, 1).length],
    trials,
    isSeparate,
  });
}

/** The truth of a trial; the familiarisation trial (0) has none. */
export function truthOf(draw: Draw, trial: number): string {
  const truth = draw.truths[trial - 1];
  if (truth === undefined) throw new RangeError(`trial ${trial} is not in the draw`);
  return truth;
}

type Presented = { readonly method: Method; readonly trial: number; readonly presentation: string };

/** What a draw puts at a presentation: the cable, and the place of the specimen among that cable's. */
export function fittedBy(draw: Draw, { method, trial, presentation }: Presented): { cable: 0 | 1; specimen: number } {
  const truth = trial === 0 ? null : truthOf(draw, trial);
  const cable = method.fitted(presentation, truth, draw.firstSide);
  const deal = draw.separate?.deals?.[trial - 1] ?? 0;
  const isOther = draw.separate !== undefined && method.separate?.specimen(presentation, truth, deal) === 1;
  return { cable, specimen: isOther ? (draw.separate?.specimen ?? 0) : draw.specimens[cable] };
}

/** The blind code to be fitted for a presentation of a trial. */
export function codeFitted(question: DrawnSession & Presented): string {
  const { cable, specimen } = fittedBy(drawOf(question), question);
  const row = rowsOfCable(question.rows, cable)[specimen];
  if (row === undefined) throw new RangeError('the code key has no such specimen');
  return row.code;
}
