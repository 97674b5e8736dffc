import { z } from 'zod';
import { portrayedCueAudit } from '../cue-audit/portrayed-cue-audit.ts';
import { checkResult } from '../findings/check-result.ts';
import { finding } from '../findings/finding.ts';
import { levelReport } from '../levels/level-report.ts';
import { registeredResult } from '../methods/methods.ts';
import { endpoint } from './endpoint.ts';
import { organisationParams, thingParams } from './organisation-params.ts';
import { listQuery, pageOf } from './paging.ts';
import { protocolDifference } from './protocol-versions.ts';
import { fatigues } from './remarks.ts';
import { signedHead } from './signed-heads.ts';

export const reportRow = z.strictObject({
  studyId: z.uuid(),
  title: z.string(),
  closedAt: z.iso.datetime(),
  headline: z.string(),
});
export type ReportRow = z.output<typeof reportRow>;

/** A rate with its counts and its limits at 95 %, for display alone. */
export const countedRate = z.strictObject({
  label: z.string(),
  counted: z.int(),
  due: z.int(),
  missing: z.int(),
  interval: z.strictObject({ lower: z.number(), upper: z.number() }).nullable(),
});
export type CountedRate = z.output<typeof countedRate>;

const chanceBar = z.strictObject({ count: z.int(), chance: z.number() });

/** The report of a closed study. Everything in it is computed from the record and what the closing revealed. */
export const report = z.strictObject({
  studyId: z.uuid(),
  title: z.string(),
  question: z.string(),
  cables: z.tuple([z.string(), z.string()]),
  method: z.string(),
  closedAt: z.iso.datetime(),
  endedEarly: z.string().nullable(),
  finding,
  result: registeredResult,
  nullDistribution: z.array(chanceBar),
  /** Exploratory: counts and limits, never a p. */
  byExcerpt: z.array(z.strictObject({ title: z.string(), trials: z.int(), rates: z.array(countedRate) })),
  cueAudit: portrayedCueAudit,
  /** What the check trials came to, apart from the result; null where none were registered. */
  knownDifferences: checkResult.nullable(),
  rung: z.strictObject({ name: z.string(), why: z.string() }),
  /** The gap between presentations and the blinding rung, each in a sentence: part of the finding’s first lines. */
  conditions: z.array(z.string()),
  /** The level match at the load; null where the protocol registers no measurement. */
  levels: levelReport.nullable(),
  flow: z.strictObject({
    sessionsPlanned: z.int(),
    sessionsOpened: z.int(),
    sessionsFinished: z.int(),
    sessionsAbandoned: z.int(),
    sessionsNeverStarted: z.int(),
    trialsOpened: z.int(),
    trialsVoid: z.int(),
    trialsCounted: z.int(),
    /** Locked check trials, not among those counted. */
    trialsChecked: z.int(),
    answersExpected: z.int(),
    answersMissing: z.int(),
    /** Labels, each counted once over all sessions. */
    listeners: z.int(),
    listenersLeft: z.int(),
    /** Of the listeners, how many joined by code alone. */
    listenersUnlinked: z.int(),
  }),
  sessions: z.array(
    z.strictObject({
      number: z.int(),
      phase: z.string(),
      room: z.string(),
      startedAt: z.iso.datetime().nullable(),
      endedAt: z.iso.datetime().nullable(),
      listeners: z.int(),
      /** What was heard before the first trial and never counted: how often the labelled cables, how many practice trials. */
      training: z.strictObject({ labelled: z.int(), blind: z.int(), feedback: z.int() }),
      /** The session's draw in words: which cable bore which label; null when nothing was presented. */
      drawn: z.string().nullable(),
      reason: z.string().nullable(),
      /** How cables were told apart by hand: labels scanned, steps taken back, the inventory. */
      handling: z.strictObject({
        scanned: z.int(),
        byHand: z.int(),
        wrong: z.int(),
        undone: z.int(),
        inventory: z
          .strictObject({
            codes: z.int(),
            missing: z.array(z.string()),
            foreign: z.array(z.string()),
            reason: z.string(),
          })
          .nullable(),
      }),
      trials: z.array(
        z.strictObject({
          trial: z.int(),
          outcome: z.enum(['locked', 'void', 'open']),
          excerpt: z.string(),
          truth: z.string(),
          /** What a check trial compared, and what it is called; null for a main one. */
          check: z.strictObject({ name: z.string(), pair: z.tuple([z.string(), z.string()]) }).nullable(),
          answers: z.array(z.strictObject({ listener: z.string(), choice: z.string().nullable() })),
          longChanges: z.int(),
          /** How often each label was asked for; null where presentations came in a fixed order. */
          requested: z.array(z.strictObject({ label: z.string(), times: z.int() })).nullable(),
        }),
      ),
    }),
  ),
  /** What listeners said after the last trial and at breaks, by label: all of it. */
  said: z.strictObject({
    exits: z.array(
      z.strictObject({
        session: z.int(),
        listener: z.string(),
        wentBy: z.string(),
        noticed: z.enum(['yes', 'no']).nullable(),
        what: z.string(),
        guesses: z.array(z.strictObject({ question: z.string(), text: z.string() })),
      }),
    ),
    fatigue: z.array(
      z.strictObject({ session: z.int(), break: z.int(), listener: z.string(), fatigue: z.enum(fatigues) }),
    ),
  }),
  voids: z.array(
    z.strictObject({ session: z.int(), trial: z.int(), reason: z.string(), note: z.string(), answersHeld: z.int() }),
  ),
  missing: z.array(z.strictObject({ session: z.int(), trial: z.int(), listener: z.string(), why: z.string() })),
  deviations: z.array(z.strictObject({ at: z.iso.datetime(), session: z.int().nullable(), text: z.string() })),
  protocol: z.strictObject({
    digest: z.string(),
    sealedAt: z.iso.datetime(),
    facts: z.array(z.strictObject({ label: z.string(), value: z.string() })),
    /** Every sealed version, the first first, with what it fixes otherwise than the one before. */
    versions: z.array(
      z.strictObject({
        version: z.int(),
        sealedAt: z.iso.datetime(),
        digest: z.string(),
        reason: z.string().nullable(),
        changes: z.array(protocolDifference),
      }),
    ),
  }),
  record: z.strictObject({
    entries: z.int(),
    head: z.string(),
    /** Heads that were signed and time-stamped on the way, in order. */
    heads: z.array(signedHead),
    checks: z.array(
      z.strictObject({ name: z.string(), outcome: z.enum(['pass', 'fail', 'not checkable']), reason: z.string() }),
    ),
  }),
});
export type Report = z.output<typeof report>;

export const reportsApi = {
  list: endpoint({
    method: 'GET',
    path: '/organisations/:organisationId/reports',
    summary: 'Reports of closed studies',
    access: ['owner', 'manager', 'reviewer'],
    params: organisationParams,
    query: listQuery,
    reply: pageOf(reportRow),
  }),
  get: endpoint({
    method: 'GET',
    path: '/organisations/:organisationId/studies/:id/report',
    summary: 'The report of a closed study',
    access: ['owner', 'manager', 'reviewer'],
    params: thingParams,
    reply: report,
  }),
};
