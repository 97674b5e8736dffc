import { checkAnswers, checkSessions, checkTrials } from './check-answers.ts';
import { checkFlow, checkRules } from './check-counts.ts';
import { checkFigures } from './check-figures.ts';
import { checkListeners } from './check-listeners.ts';
import { type CheckId, type NamedCheck, nameOfCheck, recordCheckNames } from './check-names.ts';
import { checkProtocol, checkRecord } from './check-record.ts';
import { checkCodeKey, checkCommitments, checkDraws } from './check-secrets.ts';
import { type PublicationParts, readPublication } from './publication-parts.ts';
import { StudyReading } from './study-reading.ts';

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
  /** What is compared with something altered says nothing: these must have passed. */
  readonly restsOn: readonly CheckId[];
  readonly run: (read: T) => Verdict;
};

export const recordSteps: readonly Step<StudyReading>[] = [
  { id: 'record', restsOn: [], run: checkRecord },
  { id: 'protocol', restsOn: ['record'], run: checkProtocol },
  { id: 'commitments', restsOn: ['record'], run: checkCommitments },
  { id: 'codeKey', restsOn: ['record', 'protocol', 'commitments'], run: checkCodeKey },
  { id: 'draws', restsOn: ['record', 'commitments', 'codeKey'], run: checkDraws },
  { id: 'answers', restsOn: ['record'], run: checkAnswers },
  { id: 'trials', restsOn: ['record'], run: checkTrials },
  { id: 'sessions', restsOn: ['record'], run: checkSessions },
  { id: 'listeners', restsOn: ['record'], run: checkListeners },
  { id: 'rules', restsOn: ['record', 'protocol'], run: checkRules },
  {
    id: 'figures',
    restsOn: ['record', 'protocol', 'commitments', 'codeKey', 'draws', 'answers'],
    run: checkFigures,
  },
  { id: 'flow', restsOn: ['record', 'protocol'], run: checkFlow },
];

/** One check, after those it rests on. */
export function runStep<T>({ id, restsOn, run }: Step<T>, read: T, done: readonly Check[]): Check {
  const name = nameOfCheck(id);
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
    yield { id: 'file', name: nameOfCheck('file'), outcome: 'pass', reason: 'A published study in canonical form.' };
    yield* checksOf(read.parts);
    return;
  }
  yield* unreadable(read.fault, recordCheckNames);
}

/** Every check of a file that cannot be read: it fails at the first, and nothing else can be told. */
export function unreadable(fault: string, names: readonly NamedCheck[]): Check[] {
  return names.map(({ id, name }) =>
    id === 'file'
      ? { id, name, outcome: 'fail', reason: fault }
      : { id, name, outcome: 'not checkable', reason: `It rests on “${nameOfCheck('file')}”, which did not pass.` },
  );
}
