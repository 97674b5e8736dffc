import type { Method } from '../methods/method.ts';
import type { CueTrial } from './cue-trials.ts';
import { cableAt, drawnPlaces, labelOf, labelsOf } from './labels.ts';

/** In which way a cue could tell: by the answer that was right, by the cable fitted, or by whether the cable changed. */
export type ContrastName = 'answer' | 'cable' | 'changed';

/**
 * One way in which values, one at each place of a trial, could tell what was drawn. Whole weights, adding up to nothing
 * over what could have been drawn: above 0 on one side, below 0 on the other.
 */
export type Contrast = {
  readonly name: ContrastName;
  /** For a label where there are more than two: which label against the others. */
  readonly label: string | null;
  /** By what a draw could have come out as. */
  readonly byTruth: (place: number, truth: string, trial: Pick<CueTrial, 'firstSide'>) => number;
  /** By what an answer says, or null where answers say nothing of the kind. */
  readonly byLabel: ((place: number, label: string) => number) | null;
};

const against = (isIt: boolean, of: number) => (isIt ? of - 1 : -1);

/** A value for a whole trial: it could tell which label is right. */
export function trialContrasts(method: Method): Contrast[] {
  const labels = labelsOf(method);
  const asked = labels.length === 2 ? labels.slice(0, 1) : labels;
  return asked.map((label) => ({
    name: 'answer',
    label,
    byTruth: (_place, truth) => against(labelOf(method, truth) === label, labels.length),
    byLabel: (_place, said) => against(said === label, labels.length),
  }));
}

/** Whether every answer names a presentation that the draw decides, as the second of three does. */
export function namesPlaces(method: Method): boolean {
  const drawn = drawnPlaces(method);
  return labelsOf(method).every((label) => drawn.includes(method.presentations.indexOf(label)));
}

/** A value for each presentation that the draw decides. */
export function presentationContrasts(method: Method): Contrast[] {
  const labels = labelsOf(method);
  const drawn = drawnPlaces(method);
  const last = drawn.at(-1) ?? 0;
  const weigh = (place: number, label: string) => {
    if (!namesPlaces(method)) return place === last ? against(label === labels[0], labels.length) : 0;
    const named = method.presentations[place] ?? '';
    return labels.includes(named) ? against(named === label, labels.length) : 0;
  };
  return [
    {
      name: 'answer',
      label: null,
      byTruth: (place, truth) => weigh(place, labelOf(method, truth)),
      byLabel: weigh,
    },
    {
      name: 'cable',
      label: null,
      byTruth: (place, truth, { firstSide }) => (cableAt(method, place, truth, firstSide) === 0 ? 1 : -1),
      byLabel: null,
    },
    {
      name: 'changed',
      label: null,
      byTruth: (place, truth, { firstSide }) => {
        if (place === 0) return 0;
        const isOther = cableAt(method, place, truth, firstSide) !== cableAt(method, place - 1, truth, firstSide);
        return isOther ? 1 : -1;
      },
      byLabel: null,
    },
  ];
}
