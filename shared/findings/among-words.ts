import type { AmongListeners } from './among-listeners.ts';
import { formatProbability } from './format-probability.ts';
import { fewestListeners } from './people-estimates.ts';
import { percentOf } from './portrait-words.ts';

/** How the listeners differ, in sentences for the report; nothing where they heard the same or one came alone. */
export function amongWords(among: AmongListeners | null, listeners: number): string[] {
  if (among === null) return [];
  const { aboutPooled, tarone, betaBinomial, designEffect, prevalence } = among;
  const p = (tail: string) => formatProbability(Number(tail));
  const few =
    listeners < fewestListeners
      ? ` With fewer than ${fewestListeners} listeners nothing follows when these find nothing.`
      : '';
  const alike = designEffect === null ? '' : ` Design effect ${Number(designEffect).toFixed(2)}.`;
  const differences = `How far the listeners differ decides nothing: chi-square ${Number(aboutPooled.statistic).toFixed(2)} on ${aboutPooled.degreesOfFreedom} (p ${p(aboutPooled.tail)})${tarone === null ? '' : `, Tarone’s Z ${Number(tarone.z).toFixed(2)} (p ${p(tarone.tail)})`}, beta-binomial correlation ${Number(betaBinomial.correlation).toFixed(3)} (p ${p(betaBinomial.tail)}).${alike}${few}`;
  if (prevalence === null) return [differences];
  const lower =
    Number(prevalence.lowerLimit) > 0
      ? `at least ${percentOf(prevalence.lowerLimit, 'down')} of people of whom they were a sample hear it (one-sided 95\u00a0% limit; there is no upper one)`
      : 'no lower limit for the share of people who hear it follows';
  return [
    differences,
    `${prevalence.significant} of ${listeners} were significant on their own, each test at a true size of ${percentOf(prevalence.size)}: ${lower}.`,
  ];
}
