import { z } from 'zod';
import { type ChangeStep, cautions, stepKinds } from '../contracts/proctor-live.ts';

export const rigs = ['loudspeaker', 'line', 'headphone'] as const;
export type Rig = (typeof rigs)[number];

/** The steps whose order is fixed among themselves: nothing is plugged live, and no cable is scanned before it is in. */
const inOrder: readonly ChangeStep[] = ['mute', 'unplug', 'fit', 'scan', 'unmute'];

const words = (most: number) =>
  z.string().trim().min(2, 'At least 2 characters').max(most, `At most ${most} characters`);

/**
 * One step of a change. Its kind has one meaning everywhere; its words are the preset's own, and `{code}` in them stands
 * for the blind code that is fitted.
 */
export const presetStep = z.strictObject({
  kind: z.enum(stepKinds),
  /** How long the step lasts at least, in whole seconds from the step before; 0 to 120. */
  leastS: z.int('Enter seconds as a whole number').min(0, 'At least 0').max(120, 'At most 120'),
  /** What is to be done, large: "Fit {code}". */
  act: words(40),
  /** How, in a line: "loudspeaker end first, amplifier last". */
  how: words(140),
  /** What the button says once it is done: "{code} is in". */
  done: words(40),
});
export type PresetStep = z.output<typeof presetStep>;

/** Why these steps cannot make a change, in words; null when they can. */
export function stepFault(steps: readonly Pick<PresetStep, 'kind'>[]): string | null {
  const kinds = steps.map(({ kind }) => kind);
  if (new Set(kinds).size < kinds.length) return 'Each step at most once.';
  if (!kinds.includes('unplug')) return 'Unplugging is part of every change, also when the same cable goes back.';
  if (!kinds.includes('fit')) return 'A change without fitting a cable is none.';
  const ordered = kinds.filter((kind) => inOrder.includes(kind));
  if (ordered.some((kind, index) => index > 0 && inOrder.indexOf(kind) < inOrder.indexOf(ordered[index - 1] ?? kind)))
    return 'Mute comes before unplug, unplug before fit, fit before scan, scan before unmute.';
  if (kinds.includes('mute') !== kinds.includes('unmute')) return 'What is muted is unmuted again: both, or neither.';
  if (kinds.at(-1) === 'scan') return 'The scan is not the last step: whoever starts listening presses for it.';
  return null;
}

/** How long the steps last at least, in seconds. No change can be registered shorter. */
export const leastChangeS = (steps: readonly Pick<PresetStep, 'leastS'>[]): number =>
  steps.reduce((sum, { leastS }) => sum + leastS, 0);

/** A rig preset as it is chosen in a draft and frozen into a protocol: how a change is made at one kind of rig. */
export const rigPreset = z
  .strictObject({
    name: words(60),
    kind: z.enum(rigs, 'Choose the kind of rig'),
    steps: z.array(presetStep).min(2, 'At least two steps').max(stepKinds.length, 'Each step at most once'),
    /** Where levels are measured. */
    levelsAt: words(200),
    /** What the proctor reads and ticks before seating opens. */
    cautions: z.array(z.enum(cautions)).min(1, 'At least one caution').max(cautions.length, 'Each caution once'),
  })
  .check((check) => {
    const fault = stepFault(check.value.steps);
    if (fault !== null)
      check.issues.push({ code: 'custom', input: check.value.steps, path: ['steps'], message: fault });
    if (new Set(check.value.cautions).size < check.value.cautions.length)
      check.issues.push({ code: 'custom', input: check.value.cautions, path: ['cautions'], message: 'Each once' });
  });
export type RigPreset = z.output<typeof rigPreset>;
