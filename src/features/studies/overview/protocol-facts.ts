import type { Study, StudyDraft } from '#shared/contracts/studies.ts';
import { registeredLevelsText } from '#shared/levels/level-words.ts';
import { methodOf } from '#shared/methods/methods.ts';
import { analysisFacts } from '#shared/protocol/analysis-facts.ts';
import { presetFacts } from '#shared/protocol/preset-facts.ts';
import { decibels } from '#shared/protocol/protocol-checks.ts';
import { checkExclusion } from '#shared/protocol/registered-analysis.ts';
import { treatmentFacts } from '#shared/protocol/treatment.ts';
import { waysFacts } from '#shared/protocol/ways-to-run.ts';
import { breakFacts } from '#shared/session/registered-breaks.ts';
import { formatCount } from '../../../lib/format.ts';
import { percentOfPerMille, rigWords } from '../study-words.ts';

type ProtocolFact = { label: string; value: string };

/** Everything that a seal fixes, in the order in which a reader asks for it. */
export function protocolFacts({ draft, cableNames, codeHolder }: Study): ProtocolFact[] {
  const words = (label: string, value: string): ProtocolFact => ({ label, value });
  return [
    words('Question', draft.question),
    words('Method', methodOf(draft.method).name),
    ...(draft.attribute ? [words('Attribute', draft.attribute)] : []),
    ...draft.cables.map(({ specimenIds }, index) =>
      words(
        index === 0 ? (methodOf(draft.method).attribute?.firstCable ?? 'One cable') : 'The other cable',
        `${cableNames[index === 0 ? 0 : 1]}, ${formatCount(specimenIds.length, 'specimen')}`,
      ),
    ),
    ...treatmentFacts(draft.treatment),
    ...waysFacts(draft),
    words('Listening', listeningWords(draft)),
    ...(draft.samplingFrame ? [words('Listeners are drawn from', draft.samplingFrame)] : []),
    ...(draft.checks === undefined ? [] : [words('Check trials', checkWords(draft, cableNames))]),
    words('Spares', `${draft.spares} in each session`),
    words('Significance level', percentOfPerMille(draft.alphaPerMille)),
    ...analysisFacts({
      ...methodOf(draft.method).registered(draft),
      stopping: 'fixed number of trials',
      exclusions: draft.checks?.excludes ? checkExclusion : 'none',
    }),
    ...draft.programme.map(({ title, start, lengthS }, index) =>
      words(`Excerpt ${index + 1}`, `${title}, ${lengthS} s${start === '' ? '' : ` from ${start}`}`),
    ),
    words('Rig', rigWords[draft.rig]),
    ...presetFacts(draft.rigPreset),
    words('Chain', draft.chain),
    words('Level at the load', registeredLevelsText(draft.levels)),
    words('Every change', `${draft.changeS} s, real or not`),
    ...breakFacts(draft.breaks),
    words('Answer window', `${draft.answerS} s`),
    words('Confidence', draft.confidence ? 'asked with every answer' : 'not asked'),
    words('Code holder', codeHolder),
  ];
}

function checkWords({ checks }: StudyDraft, cableNames: Study['cableNames']): string {
  if (checks === undefined) return '';
  const { steps, same, reference } = checks;
  const parts = [
    ...[...steps]
      .sort((a, b) => b.milliDb - a.milliDb)
      .map(({ milliDb, trials }) => `${trials} of ${decibels(milliDb)}`),
    ...(same === 0 ? [] : [`${same} of the same with the same`]),
  ];
  return `${parts.join(', ')}, in each session, against ${cableNames[reference]}`;
}

function listeningWords({ sessions, trials, listenersPerSession }: StudyDraft): string {
  const each = `${formatCount(sessions, 'session')} of ${formatCount(trials, 'trial')}`;
  return `${each}, ${formatCount(listenersPerSession, 'listener')} ${listenersPerSession === 1 ? 'at a time' : 'together'}`;
}
