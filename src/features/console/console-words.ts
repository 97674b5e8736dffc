import type { Caution, ProctorView, VoidReason } from '#shared/contracts/proctor-live.ts';

type Rig = ProctorView['rig'];
type Step = ProctorView['steps'][number];

/** A step of a change: what to do now (large), a word on how, and what the button says once it is done. */
export type StepWords = { readonly act: string; readonly how: string; readonly done: string };

/** The words of a step. The code is shown on its sleeve; here it is named once more, to be read and said. */
export function stepWords({ steps }: Pick<ProctorView, 'steps'>, kind: Step['kind'], code: string): StepWords {
  const { act = '', how = '', done = '' } = steps.find((step) => step.kind === kind) ?? {};
  const named = (words: string) => words.replaceAll('{code}', code);
  return { act: named(act), how: named(how), done: named(done) };
}

/** What comes after a step, as the end of a line: "fit 417". */
export function wordsAfter(view: Pick<ProctorView, 'steps'>, kind: Step['kind'], code: string): string {
  const after = view.steps[view.steps.findIndex((step) => step.kind === kind) + 1];
  if (after === undefined) return 'they listen';
  const { act } = stepWords(view, after.kind, code);
  return act.charAt(0).toLowerCase() + act.slice(1);
}

/** Whether listening starts with this step. */
export const startsListening = ({ steps }: Pick<ProctorView, 'steps'>, kind: Step['kind'] | null): boolean =>
  kind !== null && steps.at(-1)?.kind === kind;

export const voidWords: Record<VoidReason, string> = {
  'wrong-cable': 'A wrong cable was fitted',
  noise: 'Noise in the room',
  'drop-out': 'Drop-out or crackle',
  'listener-request': 'A listener asked for it',
  'tool-failure': 'A tool or this program failed',
  safety: 'Safety',
};

/** One caution, by its name and its rule. */
export type CautionWords = { readonly name: string; readonly rule: string };

const amplifierOf: Record<Rig, string> = {
  loudspeaker:
    'Muted or off before a cable is changed; off is better. A cable comes off at the amplifier first and goes on there last. Valve amplifiers with output transformers never play without their load.',
  line: 'Muted or off before a plug is pulled: the pin touches before the sleeve. Mute, wait, change, wait, unmute. A cable comes off at the amplifier first and goes on there last.',
  headphone:
    'Muted or off, and the headphones off the head, at every change. A cable comes off at the amplifier first and goes on there last. The first second plays quietly, then the level rises.',
};

const shortsOf: Record<Rig, string> = {
  loudspeaker:
    'No output is ever shorted: no loose strand, one cable out before the next goes in, never two in parallel. Bridged and class-D outputs are live on both terminals: the minus is not ground.',
  line: 'No output is ever shorted: one cable out before the next goes in, never two in parallel. Balanced, bridged and class-D outputs are live on both terminals: neither may touch ground.',
  headphone:
    'No output is ever shorted: a plug moved while it is live can bridge its own contacts. Balanced, bridged and class-D outputs are live on both terminals: neither may touch ground.',
};

/** What is read and ticked before seating opens. */
export function cautionWords(caution: Caution, rig: Rig): CautionWords {
  switch (caution) {
    case 'amplifier':
      return { name: 'Amplifier', rule: amplifierOf[rig] };
    case 'shorts':
      return { name: 'Shorts', rule: shortsOf[rig] };
    case 'mains':
      return {
        name: 'Mains',
        rule: 'Mains parts stay closed. No cover of mains equipment comes off, pulled plug or not: capacitors hold their charge.',
      };
    case 'hearing':
      return {
        name: 'Hearing',
        rule: 'The level is measured and noted: 70 to 80 dBA recommended, a warning from 83 dBA, refused from 90 dBA. Everybody was asked about tinnitus and sensitive ears, and knows “Too loud” on the phone.',
      };
    case 'local-rules':
      return {
        name: 'Local rules',
        rule: 'Local codes and licensed practice prevail over anything shown here.',
      };
  }
}
