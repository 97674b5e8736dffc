import type { CableDraft } from '#shared/contracts/cables.ts';
import type { StudyDraft } from '#shared/contracts/studies.ts';
import type { RigPreset } from '#shared/protocol/rig-preset.ts';
import { plainSteps, shippedPresets } from '#shared/protocol/shipped-presets.ts';

// The demo's scenario: an invented workshop that makes loudspeaker cable for ships' saloons and homes.

export const demoOrganisation = 'Skerry Line Works';

export const demoCables: readonly {
  key: 'thin' | 'thick' | 'spare' | 'check' | 'small-check';
  draft: CableDraft;
  serials: readonly string[];
}[] = [
  {
    key: 'thin',
    draft: {
      name: 'Skerry 0.5 twin',
      kind: 'loudspeaker',
      lengthMm: 6000,
      construction: {
        material: 'copper-etp',
        build: 'stranded',
        strands: 16,
        strandDiameterMm: 0.2,
        areaMm2: 0.5,
        insulation: 'PVC',
        permittivity: 3.5,
        geometry: 'parallel',
        spacingMm: 2.2,
        connectors: 'Banana plugs',
      },
      description:
        'Two stranded copper conductors of 0.5 mm² each, side by side, clear sheath. The workshop’s cheapest run.',
    },
    serials: ['ST-0412', 'ST-0413'],
  },
  {
    key: 'thick',
    draft: {
      name: 'Skerry 4.0 twin',
      kind: 'loudspeaker',
      lengthMm: 6000,
      construction: {
        material: 'copper-etp',
        build: 'stranded',
        strands: 56,
        strandDiameterMm: 0.3,
        areaMm2: 4,
        insulation: 'PVC',
        permittivity: 3.5,
        geometry: 'parallel',
        spacingMm: 4.6,
        connectors: 'Banana plugs',
      },
      description: 'Two stranded copper conductors of 4 mm² each, same sheath and connectors as the 0.5 twin.',
    },
    serials: ['SF-0077', 'SF-0078'],
  },
  {
    key: 'spare',
    draft: {
      name: 'Holm interconnect',
      kind: 'interconnect',
      lengthMm: 1500,
      description: 'Coaxial, braided shield, 90 pF per metre as measured by the workshop.',
    },
    serials: ['HI-0101'],
  },
  {
    key: 'check',
    draft: {
      name: 'Skerry 0.5 twin, check of 1 dB',
      kind: 'check',
      lengthMm: 6000,
      description:
        'The 0.5 twin with 0.49 Ω in series with one conductor, under the same sleeve; 1.02 dB measured into 4 Ω at 1 kHz.',
    },
    serials: ['SC-1001'],
  },
  {
    key: 'small-check',
    draft: {
      name: 'Skerry 0.5 twin, check of 0.5 dB',
      kind: 'check',
      lengthMm: 6000,
      description:
        'The 0.5 twin with 0.24 Ω in series with one conductor, under the same sleeve; 0.51 dB measured into 4 Ω at 1 kHz.',
    },
    serials: ['SC-0501'],
  },
];

type Chosen = StudyDraft['cables'][number];
type Free = Omit<StudyDraft, 'cables' | 'codeHolderId'>;

const chain =
  'Network player, integrated amplifier (0.05 Ω output), two-way loudspeakers of nominal 4 Ω, listening room of 28 m².';

/** For trying things out: the plain steps, no waits, nothing to scan. */
export const benchPreset: RigPreset = {
  ...shippedPresets.loudspeaker,
  name: 'Bench, for trying out',
  steps: plainSteps('loudspeaker'),
};

/** Ready to run in three minutes: short changes and excerpts, so that a visitor sees a whole session. */
export const studyToRun: Free = {
  title: 'Study Heron',
  question: 'Can listeners in this room tell the two 6 m runs apart?',
  method: 'abx',
  sessions: 1,
  listenersPerSession: 2,
  trials: 5,
  spares: 1,
  alphaPerMille: 50,
  programme: [
    { title: 'Piano, slow', lengthS: 3, start: '0:42' },
    { title: 'Pink noise', lengthS: 3, start: '0:00' },
  ],
  rig: 'loudspeaker',
  chain,
  changeS: 5,
  answerS: 30,
  confidence: false,
};

/** Not sealed yet: a manager is still at it. */
export const draftStudy: Free = {
  ...studyToRun,
  title: 'Study Knot',
  question: 'Can one trained listener tell the two 6 m runs apart over an evening?',
  listenersPerSession: 1,
  trials: 42,
  spares: 3,
  programme: [
    { title: 'Piano, slow', lengthS: 20, start: '0:42' },
    { title: 'Cymbals', lengthS: 18, start: '2:05' },
  ],
  rigPreset: shippedPresets.loudspeaker,
  changeS: 30,
  answerS: 45,
  confidence: true,
};

/** Run in the past: a void and a missing answer are in each. */
const pastStudy: Free = {
  ...studyToRun,
  title: 'Study Curlew',
  question: 'Do listeners hear the level that a thin 6 m run costs into 4 Ω?',
  listenersPerSession: 3,
  trials: 16,
  spares: 2,
  programme: [
    { title: 'Piano, slow', lengthS: 20, start: '0:42' },
    { title: 'Strings', lengthS: 20, start: '1:10' },
    { title: 'Pink noise', lengthS: 15, start: '0:00' },
    { title: 'Cymbals', lengthS: 18, start: '2:05' },
  ],
  changeS: 30,
  answerS: 45,
};

/**
 * Closed with a difference: level is part of what is compared, is measured, and may explain it. Its labels were scanned at
 * every change.
 */
export const closedStudy: Free = {
  ...pastStudy,
  rigPreset: shippedPresets.loudspeaker,
  levels: { handling: 'as-supplied', toleranceMilliDb: 100, frequenciesHz: [100, 1000, 10_000] },
};

/** Closed, and what is left at a low level was shown to be small: it registered a margin. */
export const closedWithout: Free = {
  ...pastStudy,
  title: 'Study Dotterel',
  question: 'Is what listeners hear of the thin 6 m run small when the level is that of a conversation?',
  marginPercent: 30,
};

/** What that study puts among its trials: whether this room would have shown a known difference. */
export const knownDifferences = (...[large, small]: [Chosen, Chosen]): NonNullable<StudyDraft['checks']> => ({
  reference: 0,
  steps: [
    { ...large, milliDb: 1020, trials: 5 },
    { ...small, milliDb: 510, trials: 5 },
  ],
  same: 1,
  excludes: true,
});

/** Collecting: its first session is held, its second is planned. */
export const collectingStudy: Free = {
  ...pastStudy,
  title: 'Study Whimbrel',
  question: 'Do listeners on two evenings tell the two 6 m runs apart?',
  sessions: 2,
  trials: 12,
};

/** Closed as well: which of the two they prefer, with “no preference” on offer. */
export const closedPreference: Free = {
  ...pastStudy,
  title: 'Study Sanderling',
  question: 'Do listeners prefer one of the two 6 m runs in this room?',
  method: 'paired-preference',
  methodSettings: ['no-preference'],
};

/** Published: one listener at a time, so that the effect has an interval; one session was abandoned before its trials. */
export const publishedStudy: Free = {
  ...pastStudy,
  title: 'Study Turnstone',
  question: 'Do listeners, one at a time, tell a 0.5 mm² run of 6 m from one of 4 mm² into 4 Ω?',
  sessions: 3,
  listenersPerSession: 1,
  trials: 8,
};

export const publishedStatements = {
  paid: 'Skerry Line Works, which makes both cables, paid for the study out of its own funds.',
  supplied: 'Skerry Line Works. Both specimens of each cable were taken from stock by the code holder, unopened.',
  ties: 'The manager, the proctor and the code holder are employed by Skerry Line Works. The listeners are customers of a neighbouring shop and were not paid.',
};
