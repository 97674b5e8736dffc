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
  /** There only where specimens are separate. */
  readonly separate?: SeparateDraw | undefined;
  /** What each registered trial is, spares left out; there only where the study has check trials. */
  readonly kinds?: readonly TrialKind[] | undefined;
  /** For each check cable the place of the specimen used, from 0; there with the kinds. */
  readonly checkSpecimens?: readonly number[] | undefined;
};

export type SeparateDraw = {
  /** The place, from 0 and the same for both cables, of the specimens that serve separately. */
  readonly specimen: number;
  /** One deal per trial, spares included; left out where specimens are dealt in one way alone. */
  readonly deals?: readonly number[] | undefined;
};

export type DrawShape = {
  readonly specimenCounts: readonly [number, number];
  /** Spares included. */
  readonly trials: number;
  /** Whether the protocol registers separate specimens. */
  readonly isSeparate?: boolean;
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

type Drawn = Pick<Method, 'truths' | 'separate'>;

/**
 * Which specimens serve where, when they are separate. One place is drawn for both cables together, each time: codes
 * that serve alike in one session and not in another would tell which of them are of one cable.
 */
function drawSeparate(
  seed: string,
  { separate }: Drawn,
  { specimenCounts, trials, checks }: DrawShape,
): Pick<Draw, 'specimens' | 'separate'> {
  if (separate === null) throw new RangeError('the method has no use for separate specimens');
  const places = Math.min(...specimenCounts, ...(checks?.specimenCounts ?? []));
  if (places < 2) throw new RangeError('separate specimens need two of each cable');
  const first = fairNumber(seed, 'separate/first', places);
  const others = Array.from({ length: places }, (_, place) => place).filter((place) => place !== first);
  const specimen = others[fairNumber(seed, 'separate/other', others.length)] ?? 0;
  const deal = (index: number) => fairNumber(seed, `separate/trial/${index + 1}`, separate.deals);
  const deals = separate.deals === 1 ? {} : { deals: Array.from({ length: trials }, (_, index) => deal(index)) };
  return { specimens: [first, first], separate: { specimen, ...deals } };
}

/** What of the draw only a study with check trials has; with separate specimens check cables have the common place. */
function drawChecks(seed: string, { checks, isSeparate }: DrawShape, [place]: Draw['specimens']): Partial<Draw> {
  if (checks === undefined) return {};
  const { shape, specimenCounts, trials } = checks;
  return {
    kinds: drawKinds(seed, trials, shape),
    checkSpecimens: specimenCounts.map((count, index) =>
      isSeparate === true ? place : fairNumber(seed, `check-specimen/${index + 1}`, count),
    ),
  };
}

/** The whole draw of a session: a pure function of its seed, the method and the protocol's shape. */
export function drawSession(seed: string, method: Drawn, shape: DrawShape): Draw {
  const truths = Array.from({ length: shape.trials }, (_, index) => {
    const truth = method.truths[fairNumber(seed, `trial/${index + 1}`, method.truths.length)];
    if (truth === undefined) throw new RangeError('a method needs at least one truth');
    return truth;
  });
  const firstSide = fairNumber(seed, 'side', 2) === 0 ? 0 : 1;
  const fitted: Pick<Draw, 'specimens' | 'separate'> =
    shape.isSeparate === true
      ? drawSeparate(seed, method, shape)
      : {
          specimens: [
            fairNumber(seed, 'specimen/1', shape.specimenCounts[0]),
            fairNumber(seed, 'specimen/2', shape.specimenCounts[1]),
          ],
        };
  return { firstSide, truths, ...fitted, ...drawChecks(seed, shape, fitted.specimens) };
}
