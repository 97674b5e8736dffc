import type { Caution, ChangeStep, ProctorView, VoidReason } from '#shared/contracts/proctor-live.ts';
import { changeSteps } from '#shared/contracts/proctor-live.ts';

type Rig = ProctorView['rig'];

/** A step of a change: what to do now (large), a word on how, and what the button says once it is done. */
export type StepWords = { readonly act: string; readonly how: string; readonly done: string };

const muteOf: Record<Rig, StepWords> = {
  loudspeaker: { act: 'Stop and mute', how: 'music stopped, amplifier muted or off', done: 'It is muted' },
  line: { act: 'Stop and mute', how: 'music stopped, amplifier muted or off', done: 'It is muted' },
  headphone: {
    act: 'Stop, headphones off',
    how: 'music stopped, amplifier muted, nobody wears them',
    done: 'They are off',
  },
};

const fitOf: Record<Rig, string> = {
  loudspeaker: 'loudspeaker end first, amplifier last',
  line: 'far end first, amplifier last',
  headphone: 'headphone end first, amplifier last',
};

const checkOf: Record<Rig, string> = {
  loudspeaker: 'read the sleeve at both ends, no strand loose, seated firmly',
  line: 'read the sleeve at both ends, plugs home',
  headphone: 'read the sleeve at both ends, plugs home, headphones back on',
};

/** The words of a step. The code is shown on its sleeve; here it is named once more, to be read and said. */
export function stepWords(step: ChangeStep, rig: Rig, code: string): StepWords {
  switch (step) {
    case 'mute':
      return muteOf[rig];
    case 'unplug':
      return {
        act: 'Unplug, always',
        how: 'amplifier end first, also when the same cable goes back',
        done: 'It is unplugged',
      };
    case 'fit':
      return { act: `Fit ${code}`, how: fitOf[rig], done: `${code} is in` };
    case 'check':
      return { act: `Check ${code}`, how: checkOf[rig], done: `${code} is checked` };
    case 'unmute':
      return { act: 'Unmute and play', how: 'the same start point as always', done: 'Unmute and start listening' };
  }
}

/** What comes after a step, as the end of a line: "fit 417". */
export function wordsAfter(step: ChangeStep, rig: Rig, code: string): string {
  const after = changeSteps[changeSteps.indexOf(step) + 1];
  if (after === undefined) return 'they listen';
  const { act } = stepWords(after, rig, code);
  return act.charAt(0).toLowerCase() + act.slice(1);
}

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
