import type { ProtocolDifference } from '../contracts/protocol-versions.ts';
import { canonicalJson } from '../ledger/canonical-json.ts';
import { registeredLevelsText } from '../levels/level-words.ts';
import { methodOf } from '../methods/methods.ts';
import { breakFacts } from '../session/registered-breaks.ts';
import { analysisFacts } from './analysis-facts.ts';
import { presetFacts } from './preset-facts.ts';
import type { Protocol } from './protocol.ts';
import type { ProtocolCable } from './protocol-cable.ts';
import { checksWords, decibels } from './protocol-checks.ts';
import { treatmentFacts } from './treatment.ts';
import { waysFacts } from './ways-to-run.ts';

/** A line, and what it means beyond its words: two cables, pieces or people may bear one name. */
type Line = { label: string; value: string; ids?: string };

const rigWords = { loudspeaker: 'Loudspeaker', line: 'Line level', headphone: 'Headphone' };
const cableLabels = ['One cable', 'The other cable'] as const;

function cableLines(cable: ProtocolCable, label: string): Line[] {
  const { name, kind, lengthMm, description, specimens } = cable;
  const pieces = specimens.map(({ serial, note }) => (note === '' ? serial : `${serial} (${note})`));
  return [
    {
      label,
      value: `${name}, ${kind}, ${lengthMm / 1000} m${description === '' ? '' : `. ${description}`}`,
      ids: cable.id,
    },
    { label: `${label}, specimens`, value: pieces.join(', '), ids: specimens.map(({ id }) => id).join() },
  ];
}

/** Every line of a protocol, in the words of the page that shows it. */
function linesOf(protocol: Protocol, nameOf: (person: string) => string): Line[] {
  const { title, question, method: id, cables, design, conduct, analysis, checks } = protocol;
  const method = methodOf(id);
  const settings = (design.methodSettings ?? []).map(
    (setting) => method.settings.find((known) => known.id === setting)?.label ?? setting,
  );
  return [
    { label: 'Neutral title', value: title },
    { label: 'Question', value: question },
    { label: 'Method', value: method.name },
    { label: 'Settings of the method', value: settings.join(', ') },
    { label: 'Attribute', value: design.attribute ?? '' },
    ...cables.flatMap((cable, index) => cableLines(cable, cableLabels[index === 0 ? 0 : 1])),
    ...treatmentFacts(protocol.treatment),
    { label: 'Sessions', value: String(design.sessions) },
    { label: 'Listeners per session', value: String(design.listenersPerSession) },
    { label: 'Listeners are drawn from', value: design.samplingFrame ?? '' },
    { label: 'Trials per session', value: String(design.trials) },
    { label: 'Check trials', value: checks === undefined ? '' : checksWords(checks, cables) },
    ...(checks?.steps ?? []).flatMap(({ cable, milliDb }) => cableLines(cable, `Check cable, ${decibels(milliDb)}`)),
    { label: 'Spares', value: `${design.spares} in each session` },
    ...waysFacts(design),
    { label: 'Significance level', value: analysis.alpha },
    ...analysisFacts(analysis),
    { label: 'Analysis', value: analysis.name },
    ...conduct.programme.map(({ title: excerpt, start, lengthS }, index) => ({
      label: `Excerpt ${index + 1}`,
      value: `${excerpt}, ${lengthS} s${start === '' ? '' : ` from ${start}`}`,
    })),
    { label: 'Rig', value: rigWords[conduct.rig] },
    ...presetFacts(conduct.rigPreset),
    { label: 'Chain', value: conduct.chain },
    { label: 'Level at the load', value: registeredLevelsText(conduct.levels) },
    ...breakFacts(conduct.breaks),
    { label: 'Every change', value: `${conduct.changeS} s, real or not` },
    { label: 'Answer window', value: `${conduct.answerS} s` },
    { label: 'Confidence', value: design.confidence ? 'asked with every answer' : 'not asked' },
    { label: 'Code holder', value: nameOf(design.codeHolder), ids: design.codeHolder },
  ];
}

/** A protocol as text that two versions share where they fix the same. */
const substance = (protocol: Protocol) => canonicalJson({ ...protocol, version: 0, salt: '' });

/**
 * What one version of a protocol fixes otherwise than another, line by line in the words of the page that shows it.
 *
 * @param nameOf how a person is called; the same for two people shows them as one
 * @returns no line exactly where the two differ in nothing but their number and salt
 */
export function protocolDifferences(
  before: Protocol,
  after: Protocol,
  nameOf: (person: string) => string,
): ProtocolDifference[] {
  if (substance(before) === substance(after)) return [];
  const [old, next] = [linesOf(before, nameOf), linesOf(after, nameOf)];
  const labels = [...new Set([...old, ...next].map(({ label }) => label))];
  const lineIn = (lines: readonly Line[], wanted: string) => lines.find(({ label }) => label === wanted);
  return labels.flatMap((label) => {
    const [was, is] = [lineIn(old, label), lineIn(next, label)];
    const [before, after] = [was?.value ?? '', is?.value ?? ''];
    if (before !== after) return { label, before, after };
    return was?.ids === is?.ids ? [] : { label, before, after: `${after} (another of the same name)` };
  });
}
