import { z } from 'zod';
import { registeredLevels } from '../levels/registered-levels.ts';
import { methodIds, methods } from '../methods/methods.ts';
import { leastChangeS, rigPreset, rigs } from '../protocol/rig-preset.ts';
import { faultsOfCables, treatment } from '../protocol/treatment.ts';
import { faultsOfWays } from '../protocol/ways-to-run.ts';
import { breaksDraft } from '../session/registered-breaks.ts';
import { checkDraft, checkFaults } from './check-draft.ts';
import { endpoint, managers } from './endpoint.ts';
import { organisationParams, thingParams } from './organisation-params.ts';
import { listQuery, pageOf, sortBy } from './paging.ts';
import { protocolDifference } from './protocol-versions.ts';
import { signedHead } from './signed-heads.ts';

export const studyStates = ['draft', 'sealed', 'collecting', 'closed', 'published', 'shelved'] as const;
export type StudyState = (typeof studyStates)[number];

/** The states after closing: the secrets are open and the result is on the record. */
export const closedStates = ['closed', 'published', 'shelved'] as const satisfies readonly StudyState[];
export const isClosed = (state: StudyState) => (closedStates as readonly StudyState[]).includes(state);

const line = (most: number) =>
  z
    .string()
    .trim()
    .max(most, `At most ${most.toLocaleString('en')} characters`);
const whole = (least: number, most: number, what: string) =>
  z.int(`Enter ${what} as a whole number`).min(least, `At least ${least}`).max(most, `At most ${most}`);

const chosenCable = z.strictObject({
  cableId: z.uuid('Choose a cable'),
  specimenIds: z.array(z.uuid()).min(1, 'Choose at least one specimen').max(6, 'At most 6 specimens'),
});

const excerptDraft = z.strictObject({
  title: line(80).min(2, 'Name the excerpt'),
  lengthS: whole(2, 120, 'seconds'),
  start: line(40),
});

/**
 * Everything that a study fixes before data, as the manager types it.
 * Lengths in whole seconds; the significance level in tenths of a per cent (50 is 5 %).
 */
export const studyDraft = z
  .strictObject({
    title: line(80).min(3, 'At least 3 characters'),
    question: line(400).min(3, 'Write the question in a sentence'),
    method: z.enum(methodIds),
    /** The settings of the method that are on; left out where there are none. */
    methodSettings: z.array(z.string().max(40)).max(10).optional(),
    /** Of what one cable is asked to have more; left out or empty where the method asks for none. */
    attribute: line(30).optional(),
    /** What a result that finds nothing must be able to exclude, by the method's scale, in whole per cent; left out for none. */
    marginPercent: whole(1, 90, 'the margin in per cent').optional(),
    /** Whom the listeners are a sample of; left out or empty where nothing is said about people in general. */
    samplingFrame: line(160).optional(),
    cables: z.tuple([chosenCable, chosenCable]),
    /** What was done to the pieces of the second group, which are of the same cable; left out where two cables are compared. */
    treatment: treatment.optional(),
    /** Known differences among the trials; left out for none. */
    checks: checkDraft.optional(),
    sessions: whole(1, 20, 'sessions'),
    listenersPerSession: whole(1, 24, 'listeners'),
    trials: whole(5, 60, 'trials'),
    spares: whole(0, 10, 'spares'),
    alphaPerMille: whole(1, 200, 'tenths of a per cent'),
    programme: z.array(excerptDraft).min(1, 'Add at least one excerpt').max(12, 'At most 12 excerpts'),
    rig: z.enum(rigs, 'Choose a rig'),
    /** How a change is made there, as it was chosen; left out for five plain steps without waits. */
    rigPreset: rigPreset.optional(),
    chain: line(1000).min(3, 'Describe source, amplifier and transducers'),
    changeS: whole(3, 300, 'seconds'),
    answerS: whole(5, 300, 'seconds'),
    confidence: z.boolean(),
    /** How level at the load is handled and measured; left out where it is not. */
    levels: registeredLevels.optional(),
    /** After how many trials a break comes; left out where none is registered. */
    breaks: breaksDraft.optional(),
    /** Whether what comes again within a trial is fitted from specimens of its own; left out for no. */
    separateSpecimens: z.boolean().optional(),
    /** A single listener asks for what is presented; left out where everybody hears a fixed order. */
    onRequest: z.strictObject({ most: whole(1, 30, 'presentations') }).optional(),
    codeHolderId: z.uuid('Choose the code holder'),
  })
  .check((check) => {
    for (const { path, message } of faultsOfCables(check.value))
      check.issues.push({ code: 'custom', input: check.value.cables, path, message });
    const { method, methodSettings = [] } = check.value;
    const known = methods[method].settings.map(({ id }) => id);
    const isSound =
      methodSettings.every((id) => known.includes(id)) && new Set(methodSettings).size === methodSettings.length;
    if (!isSound)
      check.issues.push({
        code: 'custom',
        input: methodSettings,
        path: ['methodSettings'],
        message: `Choose among the settings of ${methods[method].name}, each once`,
      });
    const { attribute = '' } = check.value;
    const isAsked = methods[method].attribute !== null;
    if (isAsked !== attribute.length > 0)
      check.issues.push({
        code: 'custom',
        input: attribute,
        path: ['attribute'],
        message: isAsked ? 'Name it in a word or two, such as bass' : `${methods[method].name} asks for no attribute`,
      });
    const { checks } = check.value;
    for (const { path, message } of checks === undefined ? [] : checkFaults(checks, check.value))
      check.issues.push({ code: 'custom', input: checks, path: ['checks', ...path], message });
    const { rig, rigPreset: preset, changeS } = check.value;
    if (preset !== undefined && preset.kind !== rig)
      check.issues.push({
        code: 'custom',
        input: preset,
        path: ['rigPreset'],
        message: 'This preset is for another rig',
      });
    const least = preset === undefined ? 0 : leastChangeS(preset.steps);
    if (changeS < least)
      check.issues.push({
        code: 'custom',
        input: changeS,
        path: ['changeS'],
        message: `The waits of the rig’s steps come to ${least} s; a change cannot be shorter`,
      });
    const { marginPercent } = check.value;
    const { margin } = methods[method];
    if (marginPercent !== undefined && (margin === null || marginPercent > margin.mostPercent))
      check.issues.push({
        code: 'custom',
        input: marginPercent,
        path: ['marginPercent'],
        message: margin === null ? `${methods[method].name} takes no margin` : `At most ${margin.mostPercent}`,
      });
    for (const fault of faultsOfWays(check.value)) check.issues.push({ code: 'custom', input: check.value, ...fault });
  });
export type StudyDraft = z.output<typeof studyDraft>;

export const studyProgress = z.strictObject({
  sessionsPlanned: z.int(),
  sessionsOpened: z.int(),
  sessionsEnded: z.int(),
  /** Registered sessions that are not planned yet; an abandoned one leaves its place. */
  sessionsToPlan: z.int(),
  trialsLocked: z.int(),
  trialsRegistered: z.int(),
});

export const sealedProtocol = z.strictObject({
  version: z.int(),
  digest: z.string(),
  sealedAt: z.iso.datetime(),
  sealedBy: z.string(),
  /** The signature with which it was sealed, and its token; null for what was sealed before there were signatures. */
  signed: signedHead.nullable(),
  /** Why the version before was amended; null for the first. */
  reason: z.string().nullable(),
  /** What it fixes otherwise than the version before. */
  changes: z.array(protocolDifference),
});

/** What an amendment would change, and what would follow from it. */
export const amendmentPreview = z.strictObject({
  /** The version that it amends. */
  amends: z.int(),
  changes: z.array(protocolDifference),
  /** What becomes of the codes: none are drawn, or they stay in use, or they become void. */
  codes: z.enum(['none', 'kept', 'void']),
  sessionsReplanned: z.int(),
});
export type AmendmentPreview = z.output<typeof amendmentPreview>;

const rowShape = {
  id: z.uuid(),
  title: z.string(),
  method: z.enum(methodIds),
  state: z.enum(studyStates),
  updatedAt: z.iso.datetime(),
};
export const studyRow = z.strictObject({ ...rowShape, progress: studyProgress });
export type StudyRow = z.output<typeof studyRow>;

/** A study as its manager sees it before closing: the protocol and its progress, no score, code key or draw. */
export const study = z.strictObject({
  ...rowShape,
  draft: studyDraft,
  cableNames: z.tuple([z.string(), z.string()]),
  manager: z.string(),
  codeHolder: z.string(),
  /** The version in force. */
  sealed: sealedProtocol.nullable(),
  /** Every sealed version, the first first. */
  versions: z.array(sealedProtocol),
  /** Whether the sealed protocol can still be amended. */
  amending: z.strictObject({ allowed: z.boolean(), why: z.string() }),
  codes: z.enum(['none', 'drawn', 'confirmed']),
  progress: studyProgress,
  record: z.strictObject({ entries: z.int(), head: z.string().nullable() }),
  closing: z.strictObject({ allowed: z.boolean(), complete: z.boolean(), why: z.string() }),
  deviations: z.array(z.strictObject({ at: z.iso.datetime(), text: z.string() })),
});
export type Study = z.output<typeof study>;

const base = '/organisations/:organisationId/studies';

const studyListQuery = listQuery.extend({
  state: z.enum(['any', ...studyStates]).default('any'),
  sort: sortBy(['title', 'state', 'updatedAt'], '-updatedAt'),
});
export type StudyListQuery = z.output<typeof studyListQuery>;

export const studiesApi = {
  list: endpoint({
    method: 'GET',
    path: base,
    summary: 'Studies, newest change first',
    access: managers,
    params: organisationParams,
    query: studyListQuery,
    reply: pageOf(studyRow),
  }),
  get: endpoint({
    method: 'GET',
    path: `${base}/:id`,
    summary: 'One study: protocol and progress',
    access: managers,
    params: thingParams,
    reply: study,
  }),
  create: endpoint({
    method: 'POST',
    path: base,
    summary: 'Begin a study',
    access: managers,
    params: organisationParams,
    body: studyDraft,
    reply: study,
  }),
  update: endpoint({
    method: 'PUT',
    path: `${base}/:id`,
    summary: 'Change a draft',
    access: managers,
    params: thingParams,
    body: studyDraft,
    reply: study,
  }),
  discard: endpoint({
    method: 'DELETE',
    path: `${base}/:id`,
    summary: 'Discard a draft',
    access: managers,
    params: thingParams,
    reply: z.strictObject({ ok: z.literal(true) }),
  }),
  seal: endpoint({
    method: 'POST',
    path: `${base}/:id/seal`,
    summary: 'Seal the protocol; its digest becomes the first entry of the record',
    access: managers,
    params: thingParams,
    body: z.strictObject({}),
    reply: study,
  }),
  previewAmendment: endpoint({
    method: 'POST',
    path: `${base}/:id/amendment/preview`,
    summary: 'What an amendment of the sealed protocol would change; stores nothing',
    access: managers,
    params: thingParams,
    body: studyDraft,
    reply: amendmentPreview,
  }),
  amend: endpoint({
    method: 'POST',
    path: `${base}/:id/amendment`,
    summary: 'Amend the sealed protocol before its first session opens: seals the next version',
    access: managers,
    params: thingParams,
    body: z.strictObject({
      draft: studyDraft,
      reason: line(500).min(3, 'Say why the protocol is amended'),
      /** The version that was seen. */
      amends: z.int().min(1),
    }),
    reply: study,
  }),
  deviate: endpoint({
    method: 'POST',
    path: `${base}/:id/deviations`,
    summary: 'Record a deviation from the sealed protocol',
    access: managers,
    params: thingParams,
    body: z.strictObject({ text: line(1000).min(3, 'Say what differed and why') }),
    reply: study,
  }),
  close: endpoint({
    method: 'POST',
    path: `${base}/:id/close`,
    summary: 'Close the study: open both secrets and run the registered analysis once',
    access: managers,
    params: thingParams,
    body: z.strictObject({ reason: line(500) }),
    reply: study,
  }),
};
