import type { Report } from '#shared/contracts/reports.ts';
import type { SignedHead } from '#shared/contracts/signed-heads.ts';
import type { PortrayedCueAudit } from '#shared/cue-audit/portrayed-cue-audit.ts';
import { dbaText, responseWords } from '#shared/exposure/sound-level.ts';
import { resultsByExcerpt } from '#shared/findings/by-excerpt.ts';
import type { CheckResult } from '#shared/findings/check-result.ts';
import type { Finding } from '#shared/findings/finding.ts';
import type { Entry } from '#shared/ledger/chain.ts';
import { sealedVersions } from '#shared/ledger/protocol-versions.ts';
import type { Check } from '#shared/ledger/verify.ts';
import { levelReportOf } from '#shared/levels/level-report.ts';
import { registeredLevelsText } from '#shared/levels/level-words.ts';
import { methodOf, type RegisteredResult } from '#shared/methods/methods.ts';
import { analysisFacts } from '#shared/protocol/analysis-facts.ts';
import { presetFacts } from '#shared/protocol/preset-facts.ts';
import type { Protocol } from '#shared/protocol/protocol.ts';
import { checksWords, decibels } from '#shared/protocol/protocol-checks.ts';
import { protocolDifferences } from '#shared/protocol/protocol-differences.ts';
import { treatmentFacts } from '#shared/protocol/treatment.ts';
import { waysFacts } from '#shared/protocol/ways-to-run.ts';
import type { AnswerContent } from '#shared/session/answer-leaf.ts';
import type { BlindingRung } from '#shared/session/blinding-rung.ts';
import { countedTrials, type LockedTrial, revealedDraw } from '#shared/session/counted-trials.ts';
import type { Draw } from '#shared/session/draw.ts';
import { kindOf, truthOf } from '#shared/session/fitting.ts';
import { handlingOf } from '#shared/session/handling.ts';
import { listenersToldApart } from '#shared/session/listeners-told-apart.ts';
import { breakFacts } from '#shared/session/registered-breaks.ts';
import type { RemarkContent } from '#shared/session/remark-leaf.ts';
import type { RequestContent } from '#shared/session/request-leaf.ts';
import { onRequestSentence, requestsIn, timesAsked } from '#shared/session/requests-told.ts';
import { type RevealedKey, revealedKey } from '#shared/session/revealed-key.ts';
import { soundEvents } from '#shared/session/sound.ts';
import type { SessionState } from '#shared/session/state.ts';
import type { StudyPayloadOf } from '#shared/session/study-events.ts';
import { stepOf, type TrialKind } from '#shared/session/trial-kinds.ts';
import { blockWords, saidOf } from './said.views.ts';

export type ReportSource = {
  readonly study: { readonly id: string; readonly title: string };
  readonly protocol: Protocol;
  readonly earlierProtocols?: readonly Protocol[];
  readonly entries: readonly Entry[];
  readonly answers: readonly AnswerContent[];
  readonly remarks?: readonly RemarkContent[];
  readonly requests?: readonly RequestContent[];
  readonly states: readonly SessionState[];
  readonly rooms: ReadonlyMap<number, string>;
  readonly result: RegisteredResult;
  readonly known: CheckResult | undefined;
  readonly finding: Finding;
  readonly cueAudit: PortrayedCueAudit;
  readonly checks: readonly Check[];
  readonly rung: BlindingRung;
  readonly closing: StudyPayloadOf<'study-closed'>;
  readonly heads: readonly SignedHead[];
};

function flowOf({ states, entries }: ReportSource, counted: readonly LockedTrial[]): Report['flow'] {
  const seated = new Set(entries.filter(({ kind }) => kind === 'seating-opened').map(({ payload }) => payload.session));
  const wasOpened = ({ session }: SessionState) => seated.has(session);
  const trials = states.flatMap((state) => state.ended);
  const locked = trials.filter(({ outcome }) => outcome === 'locked');
  const opened = states.filter(wasOpened);
  const answers = counted.flatMap((trial) => trial.answers);
  const seats = states.flatMap((state) => state.seats);
  const { listeners, unlinked } = listenersToldApart(states);
  return {
    sessionsPlanned: states.length,
    sessionsOpened: opened.length,
    sessionsFinished: states.filter(({ phase }) => phase === 'finished').length,
    sessionsAbandoned: opened.filter(({ phase }) => phase === 'abandoned').length,
    sessionsNeverStarted: states.length - opened.length,
    trialsOpened: trials.length + states.filter(({ trial }) => trial !== null && trial.trial > 0).length,
    trialsVoid: trials.length - locked.length,
    trialsCounted: counted.length,
    trialsChecked: locked.length - counted.length,
    answersExpected: answers.length,
    answersMissing: answers.filter(({ choice }) => choice === null).length,
    listeners,
    listenersLeft: new Set(seats.filter(({ left }) => left).map(({ seat }) => seat)).size,
    listenersUnlinked: unlinked,
  };
}

const namesOf = ({ cables: [first, second] }: Protocol): [string, string] => [first.name, second.name];

function drawFor(source: ReportSource, state: SessionState, key: RevealedKey): Draw | null {
  const secret = key.draws.find(({ session }) => session === state.session)?.secret;
  const ran = state.ended.length > 0;
  return secret === undefined || !ran
    ? null
    : revealedDraw(state, methodOf(source.protocol.method), secret, key.codeKey.rows);
}

/** What a check trial compared. */
function checkOf(protocol: Protocol, kind: TrialKind): Report['sessions'][number]['trials'][number]['check'] {
  const { checks, cables } = protocol;
  if (checks === undefined || kind === 'main') return null;
  const reference = cables[checks.reference].name;
  const step = checks.steps[stepOf(kind) ?? -1];
  return step === undefined
    ? { name: 'the same with the same', pair: [reference, reference] }
    : { name: `known difference of ${decibels(step.milliDb)}`, pair: [reference, step.cable.name] };
}

function sessionView(source: ReportSource, state: SessionState, key: RevealedKey): Report['sessions'][number] {
  const { protocol, entries, answers, requests = [], rooms } = source;
  const own = entries.filter(({ payload }) => payload.session === state.session);
  const atOf = (...kinds: string[]) => own.find(({ kind }) => kinds.includes(kind))?.at ?? null;
  const draw = drawFor(source, state, key);
  const method = methodOf(protocol.method);
  const choiceOf = (trial: number, seat: string) =>
    answers.find((answer) => answer.session === state.sessionId && answer.trial === trial && answer.seat === seat)
      ?.choice ?? null;
  const abandoned = own.find(({ kind }) => kind === 'session-abandoned');
  return {
    number: state.session,
    phase: state.phase,
    room: rooms.get(state.session) ?? '',
    startedAt: atOf('seating-opened'),
    endedAt: atOf('session-finished', 'session-abandoned'),
    listeners: state.seats.length,
    training: {
      labelled: state.familiarisations,
      blind: state.practised.filter(({ form }) => form === 'blind').length,
      feedback: state.practised.filter(({ form }) => form === 'feedback').length,
    },
    drawn: draw === null ? null : method.trials.session(draw.firstSide, namesOf(protocol)),
    reason: abandoned === undefined ? null : String(abandoned.payload.reason),
    handling: handlingOf(state),
    trials: state.ended.map(({ trial, outcome, excerpt, seats, longChanges }) => ({
      trial,
      outcome,
      excerpt: state.plan.programme[excerpt]?.title ?? '',
      truth: draw === null ? '' : truthOf(draw, trial),
      check: draw === null ? null : checkOf(protocol, kindOf(draw, state, trial)),
      answers: seats.map((listener) => ({ listener, choice: choiceOf(trial, listener) })),
      longChanges,
      requested:
        state.plan.onRequest === undefined ? null : timesAsked(requestsIn(requests, state.sessionId, trial), method),
    })),
  };
}

/** Every excerpt of the programme, whether or not it was played. */
function byExcerptOf(protocol: Protocol, counted: readonly LockedTrial[]): Report['byExcerpt'] {
  const { programme } = protocol.conduct;
  const rates = methodOf(protocol.method).trials.rates(namesOf(protocol));
  return resultsByExcerpt(counted, rates, programme.length).map(({ excerpt, trials, rates: found }) => ({
    title: programme[excerpt]?.title ?? '',
    trials,
    rates: [...found],
  }));
}

function voidsOf(entries: readonly Entry[]): Report['voids'] {
  return entries
    .filter(({ kind }) => kind === 'trial-voided')
    .map(({ payload }) => ({
      session: Number(payload.session),
      trial: Number(payload.trial),
      reason: String(payload.reason),
      note: String(payload.note),
      answersHeld: Number(payload.answersHeld),
    }));
}

function missingOf(states: readonly SessionState[]): Report['missing'] {
  return states.flatMap(({ session, ended, seats, late }) =>
    ended.flatMap(({ trial, missing }) =>
      missing.map((listener) => {
        const arrivedLate = late.some((answer) => answer.trial === trial && answer.seat === listener);
        const left = seats.some(({ seat, left: hasLeft }) => seat === listener && hasLeft);
        const why = arrivedLate
          ? 'arrived after the trial had locked'
          : left
            ? 'had left the session by its end'
            : 'no answer in time';
        return { session, trial, listener, why };
      }),
    ),
  );
}

function factsOf({
  design,
  conduct,
  analysis,
  cables,
  method,
  checks,
  treatment,
}: Protocol): Report['protocol']['facts'] {
  const specimens = cables.map(({ name, specimens: own }) => `${name}: ${own.map(({ serial }) => serial).join(', ')}`);
  return [
    { label: 'Method', value: methodOf(method).name },
    ...(design.attribute === undefined ? [] : [{ label: 'Attribute', value: design.attribute }]),
    { label: 'Specimens', value: specimens.join('; ') },
    ...treatmentFacts(treatment),
    { label: 'Sessions', value: String(design.sessions) },
    { label: 'Listeners per session', value: String(design.listenersPerSession) },
    ...waysFacts(design),
    ...(design.samplingFrame === undefined ? [] : [{ label: 'Listeners are drawn from', value: design.samplingFrame }]),
    { label: 'Trials per session', value: `${design.trials}, ${design.spares} spare` },
    ...(checks === undefined ? [] : [{ label: 'Check trials', value: checksWords(checks, cables) }]),
    { label: 'Significance level', value: analysis.alpha },
    ...analysisFacts(analysis),
    { label: 'Change', value: `${conduct.changeS} s, real or sham` },
    { label: 'Answer window', value: `${conduct.answerS} s` },
    { label: 'Programme', value: conduct.programme.map(({ title, lengthS }) => `${title} (${lengthS} s)`).join('; ') },
    { label: 'Level at the load', value: registeredLevelsText(conduct.levels) },
    ...breakFacts(conduct.breaks),
    { label: 'Chain', value: conduct.chain },
    ...presetFacts(conduct.rigPreset),
  ];
}

/** Every version of the protocol; people stand in it by their random ids. */
function versionsOf({ entries, protocol, earlierProtocols = [] }: ReportSource): Report['protocol']['versions'] {
  const protocols = [...earlierProtocols, protocol];
  return sealedVersions(entries).map(({ version, at, digest, reason }, index) => {
    const [before, after] = [protocols[index - 1], protocols[index]];
    const changes = before === undefined || after === undefined ? [] : protocolDifferences(before, after, (id) => id);
    return { version, sealedAt: at, digest, reason, changes };
  });
}

/** How loud it was at the listening position, session by session, where it was recorded. */
function soundLines(entries: readonly Entry[]): string[] {
  const last = new Map<number, string>();
  for (const { kind, payload } of entries) {
    if (kind !== 'sound-level-recorded') continue;
    const { session, tenthsDba, response, place, reason } = soundEvents['sound-level-recorded'].parse(payload);
    const why = reason === '' ? '' : ` It was that loud for a reason: ${reason}`;
    last.set(
      session,
      `Sound level in session ${session}: ${dbaText(tenthsDba)} (${responseWords[response]}), ${place}.${why}`,
    );
  }
  return [...last.values()];
}

/** How level was handled is among the finding's own lines. */
function conditionsOf({ protocol, entries, states, rung, requests = [] }: ReportSource): Report['conditions'] {
  const { conduct } = protocol;
  const asked = onRequestSentence(states, requests, methodOf(protocol.method));
  const long = states.flatMap(({ ended }) => ended).reduce((sum, { longChanges }) => sum + longChanges, 0);
  const late = long === 0 ? '' : `; ${long} of them took a whole number of times as long`;
  return [
    `Changes between presentations lasted ${conduct.changeS} s, real or sham${late}.`,
    ...(asked === null ? [] : [asked]),
    ...soundLines(entries),
    `Blinding: ${rung.name}. ${rung.why}`,
  ];
}

/** The report, field by field. */
export function reportView(source: ReportSource): Report {
  const { study, protocol, entries, states, answers, result, known, finding, checks, rung, closing, heads } = source;
  const method = methodOf(protocol.method);
  const key = revealedKey.parse(entries.find(({ kind }) => kind === 'key-revealed')?.payload);
  const counted = countedTrials(method, states, key, answers);
  const sealing = sealedVersions(entries).at(-1);
  const closedAt = entries.find(({ kind }) => kind === 'study-closed')?.at;
  const head = entries.at(-1);
  if (sealing === undefined || closedAt === undefined || head === undefined)
    throw new Error('a closed study without its record');
  return {
    studyId: study.id,
    title: study.title,
    question: protocol.question,
    cables: namesOf(protocol),
    method: method.name,
    closedAt,
    endedEarly: closing.complete ? null : closing.reason,
    finding,
    result,
    nullDistribution: method.nullDistribution(counted),
    byExcerpt: byExcerptOf(protocol, counted),
    knownDifferences: known ?? null,
    cueAudit: source.cueAudit,
    rung: { name: rung.name, why: rung.why },
    conditions: conditionsOf(source),
    levels:
      protocol.conduct.levels === undefined
        ? null
        : levelReportOf(entries, key.codeKey.rows, protocol.conduct.levels, namesOf(protocol)),
    flow: flowOf(source, counted),
    sessions: states.map((state) => sessionView(source, state, key)),
    said: saidOf(source),
    voids: voidsOf(entries),
    missing: missingOf(states),
    deviations: entries.flatMap(({ at, kind, payload }) => {
      const text = kind === 'deviation-recorded' ? String(payload.text) : blockWords(kind, payload);
      return text === null ? [] : [{ at, session: payload.session === null ? null : Number(payload.session), text }];
    }),
    protocol: {
      digest: sealing.digest,
      sealedAt: sealing.at,
      facts: factsOf(protocol),
      versions: versionsOf(source),
    },
    record: {
      entries: entries.length,
      head: head.digest,
      heads: [...heads],
      checks: checks.map(({ name, outcome, reason }) => ({ name, outcome, reason })),
    },
  };
}
