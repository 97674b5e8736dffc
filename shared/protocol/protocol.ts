import { z } from 'zod';
import type { StudyDraft } from '../contracts/studies.ts';
import { canonicalJson } from '../ledger/canonical-json.ts';
import { digest } from '../ledger/digest.ts';
import { type RegisteredLevels, registeredLevels } from '../levels/registered-levels.ts';
import type { MethodChoices } from '../methods/method.ts';
import { methodOf } from '../methods/methods.ts';
import type { SessionPlan } from '../session/events.ts';
import { breaksDraft } from '../session/registered-breaks.ts';
import { checkTrialsIn } from '../session/trial-kinds.ts';
import { type ProtocolCable, protocolCable } from './protocol-cable.ts';
import { checksFromDraft, protocolChecks, shapeOf } from './protocol-checks.ts';
import { checkExclusion, registeredAnalysis } from './registered-analysis.ts';
import { rigPreset, rigs } from './rig-preset.ts';
import { nameInStudy, treatment } from './treatment.ts';
import { chosenWays, waysToRun } from './ways-to-run.ts';

/** Everything fixed before data, as it is sealed. Times in seconds, lengths in millimetres, decimals as text. */
export const protocol = z.strictObject({
  format: z.literal('fairlead-protocol'),
  version: z.int(),
  study: z.uuid(),
  /** 32 random bytes, so that nobody can confirm a guessed cable from the digest. */
  salt: z.string().regex(/^[0-9a-f]{64}$/),
  title: z.string(),
  question: z.string(),
  method: z.string(),
  cables: z.tuple([protocolCable, protocolCable]),
  /** What was done to the pieces of the second; left out where two cables are compared. */
  treatment: treatment.optional(),
  design: z.strictObject({
    sessions: z.int(),
    listenersPerSession: z.int(),
    trials: z.int(),
    spares: z.int(),
    confidence: z.boolean(),
    /** The settings of the method that are on; left out where there are none. */
    methodSettings: z.array(z.string()).optional(),
    /** Of what one cable is asked to have more; left out where the method asks for none. */
    attribute: z.string().optional(),
    /** Whom the listeners are a sample of; left out where nothing is to be said about people in general. */
    samplingFrame: z.string().optional(),
    ...waysToRun,
    codeHolder: z.uuid(),
  }),
  conduct: z.strictObject({
    rig: z.enum(rigs),
    /** How a change is made at this rig, whole, as it was when sealed; left out before there were presets. */
    rigPreset: rigPreset.optional(),
    chain: z.string(),
    changeS: z.int(),
    answerS: z.int(),
    programme: z.array(z.strictObject({ title: z.string(), start: z.string(), lengthS: z.int() })),
    /** How level is handled and measured; left out where it is not measured. */
    levels: registeredLevels.optional(),
    /** After how many trials a break comes and how long it lasts; left out where none is registered. */
    breaks: breaksDraft.optional(),
  }),
  /** Known differences among the trials; left out where none are registered. */
  checks: protocolChecks.optional(),
  /** The registered analysis, as data: what is run once at closing. */
  analysis: registeredAnalysis,
});
export type Protocol = z.output<typeof protocol>;

/** The significance level as decimal text: 50 per mille is '0.05'. */
export function alphaText(perMille: number): string {
  return (perMille / 1000).toString();
}

/** Settings in one order, whatever the order in which they were ticked, and no field where nothing was chosen. */
function chosenOf({ methodSettings = [], attribute = '' }: MethodChoices): {
  methodSettings?: string[];
  attribute?: string;
} {
  return {
    ...(methodSettings.length === 0 ? {} : { methodSettings: [...methodSettings].sort() }),
    ...(attribute === '' ? {} : { attribute }),
  };
}

/** Frequencies in rising order, whatever the order in which they were ticked. */
const inOrder = (levels: RegisteredLevels): RegisteredLevels => ({
  ...levels,
  frequenciesHz: [...levels.frequenciesHz].sort((a, b) => a - b),
});

/** Two groups of pieces of one cable bear names of their own in everything that follows. */
const named = (cable: ProtocolCable, index: 0 | 1, draft: StudyDraft): ProtocolCable => ({
  ...cable,
  name: nameInStudy(cable.name, index, draft.treatment),
});

/** The protocol that a draft comes to, with its cables spelt out as they are now. */
export function protocolFromDraft(
  draft: StudyDraft,
  fixed: {
    study: string;
    version: number;
    salt: string;
    cables: readonly [ProtocolCable, ProtocolCable];
    /** The check cable of a step. */
    checkCable: (step: { readonly cableId: string }) => ProtocolCable;
  },
): Protocol {
  return {
    format: 'fairlead-protocol',
    version: fixed.version,
    study: fixed.study,
    salt: fixed.salt,
    title: draft.title,
    question: draft.question,
    method: draft.method,
    cables: [named(fixed.cables[0], 0, draft), named(fixed.cables[1], 1, draft)],
    ...(draft.treatment === undefined ? {} : { treatment: draft.treatment }),
    design: {
      sessions: draft.sessions,
      listenersPerSession: draft.listenersPerSession,
      trials: draft.trials,
      spares: draft.spares,
      confidence: draft.confidence,
      ...chosenOf(draft),
      ...(draft.samplingFrame === undefined || draft.samplingFrame === ''
        ? {}
        : { samplingFrame: draft.samplingFrame }),
      ...chosenWays(draft),
      codeHolder: draft.codeHolderId,
    },
    conduct: {
      rig: draft.rig,
      ...(draft.rigPreset === undefined ? {} : { rigPreset: draft.rigPreset }),
      chain: draft.chain,
      changeS: draft.changeS,
      answerS: draft.answerS,
      programme: draft.programme.map(({ title, start, lengthS }) => ({ title, start, lengthS })),
      ...(draft.levels === undefined ? {} : { levels: inOrder(draft.levels) }),
      ...(draft.breaks === undefined ? {} : { breaks: draft.breaks }),
    },
    ...(draft.checks === undefined ? {} : { checks: checksFromDraft(draft.checks, fixed.checkCable) }),
    analysis: {
      ...methodOf(draft.method).registered(draft),
      alpha: alphaText(draft.alphaPerMille),
      stopping: 'fixed number of trials',
      exclusions: draft.checks?.excludes ? checkExclusion : 'none',
    },
  };
}

/** SHA-256 over the canonical protocol; the salt is part of it. */
export function protocolDigest(value: Protocol): string {
  return digest('protocol', canonicalJson(value));
}

/** What a session takes from its study's protocol. Nothing in it names a cable. */
export function sessionPlanOf({ method, design, conduct, checks }: Protocol): SessionPlan {
  return {
    method,
    ...chosenOf(design),
    trials: design.trials + checkTrialsIn(checks && shapeOf(checks)),
    spares: design.spares,
    ...(checks === undefined ? {} : { checks: shapeOf(checks) }),
    rig: conduct.rig,
    ...(conduct.rigPreset === undefined ? {} : { rigPreset: conduct.rigPreset }),
    changeMs: conduct.changeS * 1000,
    answerMs: conduct.answerS * 1000,
    confidence: design.confidence,
    ...chosenWays(design),
    programme: conduct.programme.map(({ title, start, lengthS }) => ({ title, start, lengthMs: lengthS * 1000 })),
    ...(conduct.levels === undefined ? {} : { levels: conduct.levels }),
    ...(conduct.breaks === undefined ? {} : { breaks: conduct.breaks }),
  };
}

/** Every cable that is coded, in the code key's order: the two of the question, then the check cables by step. */
export function codedCables({ cables, checks }: Protocol): ProtocolCable[] {
  return [...cables, ...(checks?.steps.map(({ cable }) => cable) ?? [])];
}
