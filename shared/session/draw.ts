import { digest, hexToBytes } from '../ledger/digest.ts';
import type { Method } from '../methods/method.ts';
import { fairNumber } from './fair-number.ts';
import { type CheckShape, drawKinds, type TrialKind } from './trial-kinds.ts';

// docs/spec/blind.md describes this construction with test vectors, so that anyone can recompute a draw.

/**
 * The seed of a session's draw: the server's committed secret and the phones' revealed contributions, in listed order.
 *
 * @param secret 32 bytes as hex
 * @param contributions 32 bytes each, as hex, in the order in which the record lists them
 * @returns 32 bytes as hex
 */
export function drawSeed(secret: string, contributions: readonly string[]): string {
  return digest('drawSeed', hexToBytes(secret), ...contributions.map((value) => hexToBytes(value)));
}

/** What a session's draw fixes: which cable has the method's first side, which specimens are used, what every trial's truth is. */
export type Draw = {
  /** The protocol's cable that has the method's first side: A, or what familiarisation presents first. */
  readonly firstSide: 0 | 1;
  /** For each of the protocol's two cables the place of the specimen used, from 0. */
  readonly specimens: readonly [number, number];
  /** One truth per trial, spares included; trial 1 comes first. */
  readonly truths: readonly string[];
  /** What each registered trial is, spares left out; there only where the study has check trials. */
  readonly kinds?: readonly TrialKind[] | undefined;
  /** For each check cable the place of the specimen used, from 0; there with the kinds. */
  readonly checkSpecimens?: readonly number[] | undefined;
};

export type DrawShape = {
  readonly specimenCounts: readonly [number, number];
  /** Spares included. */
  readonly trials: number;
  readonly checks?:
    | {
        readonly shape: CheckShape;
        /** Of each check cable. */
        readonly specimenCounts: readonly number[];
        /** Registered trials: without the spares. */
        readonly trials: number;
      }
    | undefined;
};

/** The whole draw of a session: a pure function of its seed, the method and the protocol's shape. */
export function drawSession(seed: string, method: Pick<Method, 'truths'>, shape: DrawShape): Draw {
  const truths = Array.from({ length: shape.trials }, (_, index) => {
    const truth = method.truths[fairNumber(seed, `trial/${index + 1}`, method.truths.length)];
    if (truth === undefined) throw new RangeError('a method needs at least one truth');
    return truth;
  });
  return {
    firstSide: fairNumber(seed, 'side', 2) === 0 ? 0 : 1,
    specimens: [
      fairNumber(seed, 'specimen/1', shape.specimenCounts[0]),
      fairNumber(seed, 'specimen/2', shape.specimenCounts[1]),
    ],
    truths,
    ...(shape.checks === undefined
      ? {}
      : {
          kinds: drawKinds(seed, shape.checks.trials, shape.checks.shape),
          checkSpecimens: shape.checks.specimenCounts.map((count, index) =>
            fairNumber(seed, `check-specimen/${index + 1}`, count),
          ),
        }),
  };
}
