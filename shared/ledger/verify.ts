import { checkAnswers, checkSessions, checkTrials } from './check-answers.ts';
import { checkFlow, checkRules } from './check-counts.ts';
import { checkFigures } from './check-figures.ts';
import { checkListeners } from './check-listeners.ts';
import { checkProtocol, checkRecord } from './check-record.ts';
import { checkCodeKey, checkCommitments, checkDraws } from './check-secrets.ts';
import { type PublicationParts, readPublication } from './publication-parts.ts';
import { StudyReading } from './study-reading.ts';

export const recordCheckIds = [
  'record',
  'protocol',
  'commitments',
  'codeKey',
  'draws',
  'answers',
  'trials',
  'sessions',
  'listeners',
  'rules',
  'figures',
  'flow',
] as const;
export type RecordCheckId = (typeof recordCheckIds)[number];
/** What a bundle has beside the record. */
export type BundleCheckId = 'published' | 'signatures' | 'sealingTime' | 'drawTime' | 'tables';
export type CheckId = 'file' | RecordCheckId | BundleCheckId;

export type Check = {
  readonly id: CheckId;
  readonly name: string;
  readonly outcome: 'pass' | 'fail' | 'not checkable';
  readonly reason: string;
};

/** What a check found: faults, the first of which is told; else what cannot be told here and why; else what was seen to hold. */
export type Verdict = { readonly faults: readonly string[]; readonly open?: string; readonly held: string };

export type Step<T> = {
  readonly id: CheckId;
  readonly name: string;
  /** What is compared with something altered says nothing: these must have passed. */
  readonly restsOn: readonly CheckId[];
  readonly run: (read: T) => Verdict;
};

export const recordSteps: readonly Step<StudyReading>[] = [
  { id: 'record', name: 'Record unbroken', restsOn: [], run: checkRecord },
  { id: 'protocol', name: 'Protocol unchanged since sealing', restsOn: ['record'], run: checkProtocol },
  { id: 'commitments', name: 'Commitments match the revealed secrets', restsOn: ['record'], run: checkCommitments },
  { id: 'codeKey', name: 'Code key as committed', restsOn: ['record', 'commitments'], run: checkCodeKey },
  { id: 'draws', name: 'Draws recomputed', restsOn: ['record', 'commitments', 'codeKey'], run: checkDraws },
  { id: 'answers', name: 'Answers match their leaves', restsOn: ['record'], run: checkAnswers },
  { id: 'trials', name: 'Every drawn trial accounted for', restsOn: ['record'], run: checkTrials },
  { id: 'sessions', name: 'Session numbers without gaps', restsOn: ['record'], run: checkSessions },
  { id: 'listeners', name: 'One label to a listener', restsOn: ['record'], run: checkListeners },
  {
    id: 'rules',
    name: 'Exclusions and missing answers by rule',
    restsOn: ['record', 'protocol'],
    run: checkRules,
  },
  {
    id: 'figures',
    name: 'Figures recomputed',
    restsOn: ['record', 'protocol', 'commitments', 'codeKey', 'draws', 'answers'],
    run: checkFigures,
  },
  { id: 'flow', name: 'Numbers add up', restsOn: ['record'], run: checkFlow },
];

export const fileName = 'File readable';

/** Every check by its name, in order, for a page that shows them before they have run. */
export const checkNames: readonly { readonly id: CheckId; readonly name: string }[] = [
  { id: 'file', name: fileName },
  ...recordSteps.map(({ id, name }) => ({ id, name })),
];

/** One check, after those it rests on. */
export function runStep<T>({ id, name, restsOn, run }: Step<T>, read: T, done: readonly Check[]): Check {
  const missing = done.find((check) => restsOn.includes(check.id) && check.outcome !== 'pass');
  if (missing !== undefined)
    return { id, name, outcome: 'not checkable', reason: `It rests on “${missing.name}”, which did not pass.` };
  try {
    const { faults, open, held } = run(read);
    const [fault] = faults;
    if (fault !== undefined) return { id, name, outcome: 'fail', reason: fault };
    return open === undefined
      ? { id, name, outcome: 'pass', reason: held }
      : { id, name, outcome: 'not checkable', reason: open };
  } catch (error) {
    // What it rests on has passed, so whatever cannot be read or computed lies in what is checked here.
    return { id, name, outcome: 'fail', reason: error instanceof Error ? error.message : String(error) };
  }
}

/**
 * Checks a closed study from its parts, one line per check with its reason in plain words. Pure: the same code runs on the
 * server and wherever somebody distrusts it.
 */
export function* checksOf(parts: PublicationParts): Generator<Check> {
  const study = new StudyReading(parts);
  const done: Check[] = [];
  for (const step of recordSteps) {
    const check = runStep(step, study, done);
    done.push(check);
    yield check;
  }
}

export function verifyStudy(parts: PublicationParts): Check[] {
  return [...checksOf(parts)];
}

/**
 * The same for a downloaded file, whose reading is the first check.
 *
 * @param text the file's content, or null when it is no text in UTF-8
 */
export function* checksOfFile(text: string | null): Generator<Check> {
  const read = text === null ? { fault: 'It is not text in UTF-8.' } : readPublication(text);
  if ('parts' in read) {
    yield { id: 'file', name: fileName, outcome: 'pass', reason: 'A published study in canonical form.' };
    yield* checksOf(read.parts);
    return;
  }
  yield { id: 'file', name: fileName, outcome: 'fail', reason: read.fault };
  const reason = `It rests on “${fileName}”, which did not pass.`;
  for (const { id, name } of recordSteps) yield { id, name, outcome: 'not checkable', reason };
}
