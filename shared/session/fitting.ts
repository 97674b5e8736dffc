import type { Method } from '../methods/method.ts';
import type { CodeKeyRow } from './commitments.ts';
import { type Draw, drawSeed, drawSession } from './draw.ts';

export type DrawnSession = {
  readonly secret: string;
  readonly contributions: readonly string[];
  readonly method: Method;
  readonly trials: number;
  readonly rows: readonly CodeKeyRow[];
};

const rowsOfCable = (rows: readonly CodeKeyRow[], cable: number) => rows.filter((row) => row.cable === cable);

/** A session's draw from its secret, its contributions and the study's code key. */
export function drawOf({ secret, contributions, method, trials, rows }: DrawnSession): Draw {
  return drawSession(drawSeed(secret, contributions), method, {
    specimenCounts: [rowsOfCable(rows, 0).length, rowsOfCable(rows, 1).length],
    trials,
  });
}

/** The truth of a trial; the familiarisation trial (0) has none. */
export function truthOf(draw: Draw, trial: number): string {
  const truth = draw.truths[trial - 1];
  if (truth === undefined) throw new RangeError(`trial ${trial} is not in the draw`);
  return truth;
}

/** The blind code to be fitted for a presentation of a trial. */
export function codeFitted(question: DrawnSession & { readonly trial: number; readonly presentation: string }): string {
  const { method, rows, trial, presentation } = question;
  const draw = drawOf(question);
  const cable = method.fitted(presentation, trial === 0 ? null : truthOf(draw, trial), draw.firstSide);
  const row = rowsOfCable(rows, cable)[draw.specimens[cable]];
  if (row === undefined) throw new RangeError('the code key has no such specimen');
  return row.code;
}
