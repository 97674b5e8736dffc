import type { Method } from '../methods/method.ts';
import { type Contrast, presentationContrasts, trialContrasts } from './contrasts.ts';
import type { CueTrial, PresentationTimes } from './cue-trials.ts';
import { drawnPlaces } from './labels.ts';

/** Something that somebody in the room could have gone by, as a number for each place of each trial. */
export type Cue = {
  /** `step/fit`, `change`, `position` ... as it stands on the record. */
  readonly id: string;
  /** Milliseconds, or a plain number where it is no time. */
  readonly isTime: boolean;
  /** The places of a trial that have a value. One place where it is the whole trial's. */
  readonly places: readonly number[];
  readonly contrasts: readonly Contrast[];
  /** Whether it was there before the answers, so that they could have followed it. */
  readonly isBeforeAnswers: boolean;
  valueAt(trial: CueTrial, place: number): number | null;
};

/** Every step that occurs, in the order in which it first does. */
function stepNames(trials: readonly CueTrial[]): string[] {
  return [...new Set(trials.flatMap(({ presentations }) => presentations.flatMap(({ steps }) => [...steps.keys()])))];
}

/**
 * The cues of a study: all that the record holds beside the sound, before anybody has looked at what was drawn.
 *
 * @param method the study's
 * @param trials every locked trial
 */
export function cuesOf(method: Method, trials: readonly CueTrial[]): Cue[] {
  const drawn = drawnPlaces(method);
  const before = [...method.presentations.keys()].filter((place) => !drawn.includes(place));
  const ofPresentation = (id: string, of: (times: PresentationTimes) => number | null): Cue => ({
    id,
    isTime: true,
    places: drawn,
    contrasts: presentationContrasts(method),
    isBeforeAnswers: true,
    valueAt: ({ presentations }, place) => {
      const times = presentations[place];
      return times === undefined ? null : of(times);
    },
  });
  const ofTrial = (id: string, of: (trial: CueTrial) => number | null, more: Partial<Cue> = {}): Cue => ({
    id,
    isTime: true,
    places: [0],
    contrasts: trialContrasts(method),
    isBeforeAnswers: true,
    valueAt: of,
    ...more,
  });
  return [
    ...stepNames(trials).map((step) => ofPresentation(`step/${step}`, ({ steps }) => steps.get(step) ?? null)),
    ofPresentation('ready', ({ ready }) => ready),
    ofPresentation('change', ({ change }) => change),
    ofPresentation('listening', ({ listening }) => listening),
    ...(before.length === 0
      ? []
      : [
          ofTrial('before', ({ presentations }) =>
            before.reduce<number | null>((sum, place) => {
              const ready = presentations[place]?.ready ?? null;
              return sum === null || ready === null ? null : sum + ready;
            }, 0),
          ),
        ]),
    ofTrial('gap', ({ gap }) => gap),
    ofTrial('answering', ({ answering }) => answering, { isBeforeAnswers: false }),
    ofTrial('position', ({ position }) => position, { isTime: false }),
  ];
}
