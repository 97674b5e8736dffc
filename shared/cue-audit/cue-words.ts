import type { CableNames, Method } from '../methods/method.ts';
import { namesPlaces } from './contrasts.ts';
import type { CueLine } from './cue-audit-result.ts';
import { labelsOf } from './labels.ts';

const steps: { readonly [step: string]: string } = {
  mute: 'muting',
  unplug: 'unplugging',
  fit: 'fitting',
  scan: 'scanning',
  check: 'checking',
  settle: 'settling',
};

/** A cue as a sentence has it: "fitting", "the pause before the trial". */
export function cueName(cue: string, method: Method): string {
  if (cue.startsWith('step/')) {
    const step = cue.slice('step/'.length);
    return steps[step] ?? `the step “${step}”`;
  }
  const names: { readonly [cue: string]: string } = {
    ready: 'the change up to its last step',
    change: 'the change up to the start of listening',
    listening: 'listening',
    before: `the changes before ${method.presentations.at(-1)}`,
    gap: 'the pause before the trial',
    answering: 'answering',
    position: 'the place in the session',
    previous: 'what was drawn in the trial before',
    alternation: 'the listener’s own answer before',
  };
  return names[cue] ?? cue;
}

export const capital = (words: string) => `${words.charAt(0).toUpperCase()}${words.slice(1)}`;

/** The two sides of what a line contrasts, the one with positive weights first. */
export function sidesOf(
  line: Pick<CueLine, 'cue' | 'question' | 'contrast' | 'label'>,
  method: Method,
  cables: CableNames,
) {
  const { contrast, label, question } = line;
  if (contrast === 'cable') return [`when ${cables[0]} was fitted`, `when ${cables[1]} was fitted`] as const;
  if (contrast === 'changed')
    return ['when the cable was another one than before', 'when it was the same one'] as const;
  const labels = labelsOf(method);
  const [first, second] = [label ?? labels[0] ?? '', labels.find((one) => one !== (label ?? labels[0])) ?? ''];
  const isOfPresentation = label === null && namesPlaces(method);
  if (question === 'answers') {
    if (isOfPresentation) return ['for the one that was answered', 'for the others'] as const;
    const shortOf = (value: string) => method.options({}).find((option) => option.value === value)?.short ?? value;
    const others = labels.length === 2 ? `before “${shortOf(second)}”` : 'before other answers';
    return [`before “${shortOf(first)}”`, others] as const;
  }
  const named = method.trials.named(cables);
  if (isOfPresentation && named !== null) return [`for ${named}`, 'for the others'] as const;
  const others = labels.length === 2 ? `when ${method.trials.when(second, cables)}` : 'otherwise';
  return [`when ${method.trials.when(first, cables)}`, others] as const;
}

const seconds = (value: number) => `${Math.abs(value).toFixed(1)}\u00a0s`;
const perCourse = (value: number) => Number(value.toFixed(1)).toString();

/** What a cue that told something means for whoever was in the room. */
function meaning(cue: string): string {
  if (cue === 'answering') return 'It comes after the sound: it may be heard in it, or somebody may have waited.';
  if (cue === 'gap' || cue === 'before') return 'Only somebody who knew what would come could have made it so.';
  if (cue === 'position' || cue === 'previous') return 'The draw should hang on nothing of the kind.';
  if (cue === 'listening') return 'Anyone in the room could have noticed that.';
  return 'Anyone in the room could have heard that.';
}

function truthWords(line: CueLine, method: Method, cables: CableNames): string {
  const effect = Number(line.effect ?? 0);
  if (line.cue === 'previous')
    return `What was drawn came again ${effect} times where fair draws give ${perCourse(Number(line.expected))}.`;
  const [above, below] = sidesOf(line, method, cables);
  const [more, less] = effect >= 0 ? [above, below] : [below, above];
  if (line.cue === 'position')
    return `Trials came ${perCourse(Math.abs(effect))} places later ${more} than ${less}, on the average.`;
  return `${capital(cueName(line.cue, method))} took ${seconds(effect)} longer ${more} than ${less}, on the average.`;
}

function answerWords(line: CueLine, method: Method, cables: CableNames): string {
  const effect = Number(line.effect ?? 0);
  const further = 'further than with what was drawn';
  if (line.cue === 'alternation')
    return `${line.listener} changed the answer ${effect} times where the same answers in any order give ${perCourse(Number(line.expected))}: the answers went with the one before, ${further}.`;
  if (line.cue === 'previous')
    return `${effect} answers named what had been drawn in the trial before, where ${perCourse(Number(line.expected))} come by chance: as if somebody had learnt it.`;
  const [above, below] = sidesOf(line, method, cables);
  const [more, less] = effect >= 0 ? [above, below] : [below, above];
  if (line.cue === 'position')
    return `Answers went with the place in the session, ${further}: ${perCourse(Math.abs(effect))} places later ${more} than ${less}, on the average.`;
  return `Answers went with ${cueName(line.cue, method)}, ${further}: it took ${seconds(effect)} longer ${more} than ${less}, on the average.`;
}

/** What a line found, with its figure and what it means. */
export function foundWords(line: CueLine, method: Method, cables: CableNames): string {
  return line.question === 'truth'
    ? `${truthWords(line, method, cables)} ${meaning(line.cue)}`
    : answerWords(line, method, cables);
}
