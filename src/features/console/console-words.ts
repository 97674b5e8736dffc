import type { Caution, ChangeStep, ProctorView, VoidReason } from '#shared/contracts/proctor-live.ts';

type Rig = ProctorView['rig'];

/** A step of a change: what to do now (large), a word on how, and what the button says once it is done. */
export type StepWords = { readonly act: string; readonly how: string; readonly done: string };

const muteOf: Record<Rig, StepWords> = {
  loudspeaker: { act: 'Stop and mute', how: 'music stopped, amplifier muted or off', done: 'It is muted' },
  line: { act: 'Stop and mute', how: 'music stopped, amplifier muted', done: 'It is muted' },
  headphone: { act: 'Stop, headphones off', how: 'music stopped, nobody wears them', done: 'They are off' },
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
      return { act: `Fit ${code}`, how: 'the far end first, the amplifier end last', done: `${code} is in` };
    case 'check':
      return {
        act: `Check ${code}`,
        how: 'read the sleeve at both ends, no strand loose, seated firmly',
        done: `${code} is checked`,
      };
    case 'unmute':
      return { act: 'Unmute and play', how: 'the same start point as always', done: 'Unmute and start listening' };
  }
}

const amplifierOf: Record<Rig, string> = {
  loudspeaker:
    'Before a cable is changed the amplifier is muted, better powered down. Unplug at the amplifier first and plug in there last. Valve amplifiers with output transformers never run without load.',
  line: 'Mute before a plug is pulled: the pin touches before the sleeve. Mute, wait, change, wait, unmute.',
  headphone: 'Headphones are off the head, or the amplifier is muted, at every change. The first second plays quietly.',
};

/** What is read and ticked before seating opens. */
export function cautionWords(caution: Caution, rig: Rig): string {
  switch (caution) {
    case 'amplifier':
      return amplifierOf[rig];
    case 'shorts':
      return 'No output is ever shorted: no loose strands, never two cables in parallel. Bridged and class-D outputs are live on both terminals.';
    case 'mains':
      return 'Nothing inside mains equipment is opened.';
    case 'hearing':
      return 'The level is set and noted: 70 to 80 dBA recommended, a warning from 83 dBA, refused from 90 dBA. Nobody with tinnitus or sore ears takes part without having been asked.';
    case 'local-rules':
      return 'Local codes and licensed practice prevail over anything shown here.';
  }
}

export const voidWords: Record<VoidReason, string> = {
  'wrong-cable': 'A wrong cable was fitted',
  noise: 'Noise in the room',
  'drop-out': 'Drop-out or crackle',
  'listener-request': 'A listener asked for it',
  'tool-failure': 'A tool or this program failed',
  safety: 'Safety',
};

export function pauseWords({ reason, seat }: NonNullable<ProctorView['paused']>): string {
  if (reason === 'too-loud') return `Too loud${seat === null ? '' : `, from ${seat}`}`;
  return reason === 'break' ? 'Break' : 'Paused';
}
