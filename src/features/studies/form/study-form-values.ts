import type { z } from 'zod';
import type { Cable } from '#shared/contracts/cables.ts';
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

/** The rig that cables of a kind are heard on; undefined where the kind does not tell. */
export const rigOfKind: Partial<Record<Cable['kind'], Rig>> = {
  loudspeaker: 'loudspeaker',
  interconnect: 'line',
  headphone: 'headphone',
};

/** A new study begins with the preset for its rig, and with two cables where they were chosen before. */
export function newStudyWith(presets: readonly KeptPreset[], chosen: readonly Cable[] = []): StudyFormValues {
  const [first, second] = chosen;
  const rig = (first && rigOfKind[first.kind]) ?? newStudyValues.rig;
  const preset = presetFor(presets, rig);
  const base = { ...newStudyValues, rig, ...(preset === undefined ? {} : { rigPreset: preset }) };
  if (first === undefined || second === undefined) return base;
  if (first.id === second.id) return { ...base, cables: groupsOf(first), treatment: emptyTreatment };
  return { ...base, cables: [chosenCable(first), chosenCable(second)] };
}

/** What is typed of a treatment before anything is. */
export const emptyTreatment: NonNullable<StudyFormValues['treatment']> = {
  kind: 'conditioning',
  what: '',
  by: '',
  duration: '',
  signal: '',
};

/** The pieces of one cable in two groups: the first half untreated, the others treated. */
export function groupsOf(cable: Cable): StudyFormValues['cables'] {
  const { cableId, specimenIds } = chosenCable(cable);
  const half = Math.ceil(specimenIds.length / 2);
  return [
    { cableId, specimenIds: specimenIds.slice(0, half) },
    { cableId, specimenIds: specimenIds.slice(half) },
  ];
}

/** A cable with all its pieces that are in use. */
function chosenCable({ id, specimens }: Cable): StudyFormValues['cables'][number] {
  return { cableId: id, specimenIds: specimens.filter(({ archived }) => !archived).map((specimen) => specimen.id) };
}
