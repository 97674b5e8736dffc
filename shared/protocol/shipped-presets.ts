import { cautions } from '../contracts/proctor-live.ts';
import type { PresetStep, Rig, RigPreset } from './rig-preset.ts';

// The words and waits are common practice, no source: break before make, the amplifier's end off first and on last, and
// the same wait every time for relays.

const muteOf: Record<Rig, Pick<PresetStep, 'act' | 'how' | 'done'>> = {
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
  loudspeaker: 'no strand loose, seated firmly',
  line: 'plugs home',
  headphone: 'plugs home, headphones back on',
};

const mute = (rig: Rig, leastS: number): PresetStep => ({ kind: 'mute', leastS, ...muteOf[rig] });
const unplug: PresetStep = {
  kind: 'unplug',
  leastS: 0,
  act: 'Unplug, always',
  how: 'amplifier end first, also when the same cable goes back',
  done: 'It is unplugged',
};
const fitting = (rig: Rig): PresetStep => ({
  kind: 'fit',
  leastS: 0,
  act: 'Fit {code}',
  how: fitOf[rig],
  done: '{code} is in',
});
const scan: PresetStep = {
  kind: 'scan',
  leastS: 0,
  act: 'Scan {code}',
  how: 'the label at either end, in any order',
  done: 'Both ends are scanned',
};
const check = (rig: Rig, how = checkOf[rig]): PresetStep => ({
  kind: 'check',
  leastS: 0,
  act: 'Check {code}',
  how,
  done: '{code} is checked',
});
const settle = (leastS: number, how: string, done: string): PresetStep => ({
  kind: 'settle',
  leastS,
  act: 'Let it settle',
  how,
  done,
});
const start: PresetStep = {
  kind: 'unmute',
  leastS: 0,
  act: 'Unmute and play',
  how: 'the same start point as always',
  done: 'Unmute and start listening',
};

/** The steps of a session whose protocol names no preset: five, without waits. */
export const plainSteps = (rig: Rig): PresetStep[] => [
  mute(rig, 0),
  unplug,
  fitting(rig),
  check(rig, `read the sleeve at both ends, ${checkOf[rig]}`),
  start,
];

/** What every organisation begins with, by rig. */
export const shippedPresets: Readonly<Record<Rig, RigPreset>> = {
  loudspeaker: {
    name: 'Loudspeakers',
    kind: 'loudspeaker',
    steps: [
      mute('loudspeaker', 0),
      unplug,
      fitting('loudspeaker'),
      scan,
      check('loudspeaker'),
      { ...start, act: 'Unmute', how: 'the amplifier only; the music waits', done: 'It is unmuted' },
      settle(8, 'the relays close; then play from the same start point as always', 'Play and start listening'),
    ],
    levelsAt: 'At the loudspeaker’s terminals, loudspeaker connected, with this cable in place.',
    cautions: [...cautions],
  },
  line: {
    name: 'Line level',
    kind: 'line',
    steps: [
      mute('line', 3),
      unplug,
      fitting('line'),
      scan,
      check('line'),
      settle(3, 'nobody touches plug or socket', 'It has settled'),
      start,
    ],
    levelsAt: 'At the input that the cable feeds, input connected, with this cable in place.',
    cautions: [...cautions],
  },
  headphone: {
    name: 'Headphones',
    kind: 'headphone',
    steps: [
      mute('headphone', 0),
      unplug,
      fitting('headphone'),
      scan,
      check('headphone'),
      settle(2, 'headphones sit as always, hands off the cups', 'They sit'),
      { ...start, how: 'the first second quietly, then the level; the same start point as always' },
    ],
    levelsAt: 'At the headphones’ plug, headphones connected, with this cable in place.',
    cautions: [...cautions],
  },
};
