import type { Finding } from '../findings/finding.ts';
import { formatProbability } from '../findings/format-probability.ts';
import type { CableNames, Method } from '../methods/method.ts';
import type { CueAuditResult, CueLine } from './cue-audit-result.ts';
import type { CueTrial } from './cue-trials.ts';
import { capital, cueName, foundWords, sidesOf } from './cue-words.ts';
import { type Cue, cuesOf } from './cues.ts';
import { sidedValues } from './effect.ts';
import { labelOf } from './labels.ts';
import type { CuePicture, PortrayedCueAudit } from './portrayed-cue-audit.ts';

function summaryOf({ lines, trials, couldFind }: CueAuditResult): string {
  const found = lines.filter(({ isFound }) => isFound).length;
  const asked = `${lines.length} questions over ${trials} ${trials === 1 ? 'trial' : 'trials'}`;
  if (lines.length === 0) return 'Nothing was presented, so there is nothing to audit.';
  if (!couldFind) return `So few trials (${trials}) could show no trace of anything, whatever there was.`;
  if (found === 0) return `No trace of anything but the sound: ${asked}.`;
  return `A trace of something beside the sound: ${found} of ${asked}. It is a caution; it changes no figure.`;
}

function coursePicture(line: CueLine, method: Method, trials: readonly CueTrial[]): CuePicture {
  const drawn = { label: 'Drawn', marks: trials.map(({ truth }) => labelOf(method, truth)) };
  if (line.question === 'truth') return { kind: 'courses', rows: [drawn] };
  const listeners = [...new Set(trials.flatMap(({ answers }) => answers.map(({ listener }) => listener)))].sort();
  const rows = listeners
    .filter((listener) => line.listener === null || line.listener === listener)
    .map((listener) => ({
      label: listener,
      marks: trials.map(({ answers }) => answers.find((answer) => answer.listener === listener)?.choice ?? '–'),
    }));
  return { kind: 'courses', rows: [drawn, ...rows] };
}

function pictureOf(
  line: CueLine,
  cues: readonly Cue[],
  method: Method,
  cables: CableNames,
  trials: readonly CueTrial[],
): CuePicture | null {
  const cue = cues.find(({ id }) => id === line.cue);
  if (cue === undefined) return coursePicture(line, method, trials);
  const contrast = cue.contrasts.find(({ name, label }) => name === line.contrast && label === line.label);
  if (contrast === undefined) return null;
  const values = sidedValues(cue, contrast, line.question, trials);
  const [above, below] = sidesOf(line, method, cables);
  const of = (side: 1 | -1) =>
    values.filter((one) => one.side === side).map(({ value }) => (cue.isTime ? value / 1000 : value));
  return {
    kind: 'values',
    quantity: cue.isTime ? `${capital(cueName(cue.id, method))}, in seconds` : capital(cueName(cue.id, method)),
    sides: [
      { label: capital(above), values: of(1) },
      { label: capital(below), values: of(-1) },
    ],
  };
}

function rowWords(name: string, own: readonly CueLine[], audit: CueAuditResult): string {
  const found = own.filter(({ isFound }) => isFound).map(({ question }) => question);
  if (!audit.couldFind) return 'Too few trials to tell.';
  if (found.length === 2) return `A trace that ${name} told what was drawn, and that answers went with it.`;
  if (found[0] === 'truth') return `A trace that ${name} told what was drawn.`;
  if (found[0] === 'answers') return `A trace that answers went with ${name}.`;
  const asked = own.map(({ question }) =>
    question === 'truth' ? `${name} told what was drawn` : `answers went with ${own.length === 2 ? 'it' : name}`,
  );
  return `No trace that ${asked.join(', or that ')}.`;
}

/** What a report shows of a cue audit: what was found in words and pictures, then every cue with both its p. */
export function portrayCueAudit(
  audit: CueAuditResult,
  method: Method,
  cables: CableNames,
  trials: readonly CueTrial[],
): PortrayedCueAudit {
  const cues = cuesOf(method, trials);
  const ids = [...new Set(audit.lines.map(({ cue }) => cue))];
  return {
    summary: summaryOf(audit),
    isFound: audit.lines.some(({ isFound }) => isFound),
    found: audit.lines
      .filter(({ isFound }) => isFound)
      .map((line) => ({
        words: `${foundWords(line, method, cables)} Adjusted p ${formatProbability(Number(line.adjusted))}.`,
        picture: pictureOf(line, cues, method, cables, trials),
      })),
    rows: ids.map((id) => {
      const own = audit.lines.filter(({ cue }) => cue === id);
      const pOf = (question: CueLine['question']) => {
        const line = own.find((one) => one.question === question);
        return line === undefined ? null : formatProbability(Number(line.adjusted));
      };
      const name = cueName(id, method);
      return {
        cue: capital(name),
        tells: pOf('truth'),
        followed: pOf('answers'),
        words: rowWords(name, own, audit),
        isFound: own.some(({ isFound }) => isFound),
      };
    }),
  };
}

/** The finding with a caution for each cue that told something; no figure of it changes. */
export function withCueCautions(finding: Finding, audit: CueAuditResult, method: Method, cables: CableNames): Finding {
  if (finding.row === '0') return finding;
  const cautions = audit.lines
    .filter(({ isFound }) => isFound)
    .map((line) => `Caution, from the cue audit: ${foundWords(line, method, cables)} It changes no figure.`);
  return { ...finding, modifiers: [...finding.modifiers, ...cautions] };
}
