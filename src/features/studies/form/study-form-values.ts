import type { z } from 'zod';
import type { KeptPreset } from '#shared/contracts/rig-presets.ts';
import type { studyDraft } from '#shared/contracts/studies.ts';
import { methodIds } from '#shared/methods/methods.ts';
import type { Rig, RigPreset } from '#shared/protocol/rig-preset.ts';

/** What the form holds while it is being typed; numbers that are not there yet are NaN. */
export type StudyFormValues = z.input<typeof studyDraft>;

/** Sixteen trials of 30 s changes and 20 s excerpts take some three quarters of an hour: one block without a break. */
export const newStudyValues: StudyFormValues = {
  title: '',
  question: '',
  method: methodIds[0],
  methodSettings: [],
  attribute: '',
  samplingFrame: '',
  separateSpecimens: false,
  cables: [
    { cableId: '', specimenIds: [] },
    { cableId: '', specimenIds: [] },
  ],
  sessions: 1,
  listenersPerSession: 1,
  trials: 16,
  spares: 2,
  alphaPerMille: 50,
  programme: [{ title: '', start: '0:00', lengthS: 20 }],
  rig: 'loudspeaker',
  chain: '',
  changeS: 30,
  answerS: 15,
  confidence: true,
  codeHolderId: '',
};

/** The preset to begin from at a kind of rig: the one that shipped, if it is still in use. */
export function presetFor(presets: readonly KeptPreset[], rig: Rig): RigPreset | undefined {
  const fitting = presets.filter((kept) => kept.preset.kind === rig);
  return (fitting.find(({ isShipped }) => isShipped) ?? fitting[0])?.preset;
}

/** A new study begins with the preset for its rig. */
export function newStudyWith(presets: readonly KeptPreset[]): StudyFormValues {
  const preset = presetFor(presets, newStudyValues.rig);
  return preset === undefined ? newStudyValues : { ...newStudyValues, rigPreset: preset };
}
