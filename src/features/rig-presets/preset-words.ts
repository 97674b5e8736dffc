import type { Caution, ChangeStep } from '#shared/contracts/proctor-live.ts';
import type { Rig } from '#shared/protocol/rig-preset.ts';

export const rigWords: Record<Rig, string> = {
  loudspeaker: 'Loudspeaker',
  line: 'Line level',
  headphone: 'Headphone',
};

/** What each kind of step means, wherever it is used. */
export const kindWords: Record<ChangeStep, { name: string; meaning: string }> = {
  mute: { name: 'Mute', meaning: 'Nothing plays, and the amplifier is muted or off.' },
  unplug: {
    name: 'Unplug',
    meaning: 'The cable comes off, also when the same one goes back. Always part of a change.',
  },
  fit: { name: 'Fit', meaning: 'The cable with the code on the screen goes on. Always part of a change.' },
  scan: {
    name: 'Scan',
    meaning: 'The labels at both ends are read; a wrong cable is refused before anybody hears it.',
  },
  check: { name: 'Check', meaning: 'A look at what was fitted.' },
  settle: { name: 'Settle', meaning: 'Nothing is touched until its wait is over.' },
  unmute: { name: 'Unmute', meaning: 'The amplifier plays again.' },
};

export const cautionNames: Record<Caution, string> = {
  amplifier: 'Amplifier: muted or off before a cable is changed',
  shorts: 'Shorts: no output is ever shorted',
  mains: 'Mains: mains parts stay closed',
  hearing: 'Hearing: the level is measured, everybody was asked',
  'local-rules': 'Local rules: local codes and licensed practice prevail',
};
