/** A published difference in level that listeners just notice. */
export interface NoticeableLevel {
  readonly what: string;
  readonly decibels: number;
  readonly source: string;
}

/** From memory, and said so wherever they are shown. */
export const noticeableLevels: readonly NoticeableLevel[] = [
  {
    what: 'Wide-band noise, well above threshold',
    decibels: 0.4,
    source: 'Miller, Journal of the Acoustical Society of America 19 (1947), 609; from memory',
  },
  {
    what: 'Tones, 80 dB above threshold',
    decibels: 0.5,
    source: 'Jesteadt, Wier & Green, Journal of the Acoustical Society of America 61 (1977), 169; from memory',
  },
];

/** Levels matched this well pass as matched. Common practice, no source. */
export const matchedWithin = 0.1;
/** Below it a positive finding asks for a second look at the session. Common practice, no source. */
const hardlyAnything = 0.01;

export interface LevelJudgement {
  readonly word: 'noticeable' | 'between' | 'small' | 'hardly anything';
  /** How it compares with what listeners just notice. */
  readonly compared: string;
  /** What follows for planning. */
  readonly plan: string;
}

/**
 * What a difference in level between two cables lets expect of a listening test, and how to plan for it.
 *
 * @param decibels the largest difference in the audible band, either way
 * @example levelJudgement(0.005).word // "hardly anything"
 */
export function levelJudgement(decibels: number): LevelJudgement {
  const size = Math.abs(decibels);
  const least = Math.min(...noticeableLevels.map((each) => each.decibels));
  if (size >= least)
    return {
      word: 'noticeable',
      compared: `At least as large as the smallest published just-noticeable difference, ${least} dB.`,
      plan: 'A difference is to be expected from level or response alone. Match the levels, or register that the cables are compared as supplied; the finding will say so.',
    };
  if (size >= matchedWithin)
    return {
      word: 'between',
      compared: `Below the published just-noticeable differences of ${least} dB and more, above the ${matchedWithin} dB that pass as matched.`,
      plan: 'Practised listeners may notice it under good conditions. Plan for a small effect: more trials, check trials with a known step, and matched levels.',
    };
  if (size >= hardlyAnything)
    return {
      word: 'small',
      compared: `Below ${matchedWithin} dB, which passes as matched, and far below the published just-noticeable differences.`,
      plan: 'A result without a difference is likely. Plan the study so that it can show that: register a margin.',
    };
  return {
    word: 'hardly anything',
    compared: 'Below 0.01 dB: less than a level at the load can usually be measured to.',
    plan: 'A result without a difference is likely. Plan the study so that it can show that: register a margin. A positive result would ask for a look at the cues of the session, and for a replication.',
  };
}
