import { type StatementRule, saidOf } from './statement-rule.ts';

const cold = /\b(cryo\w*|deep[- ]?(frozen|freez\w+|cold|cool\w*)|liquid nitrogen|sub-?zero)\b/i;

export const coldTreatment: StatementRule = {
  id: 'cold-treatment',
  title: 'Cold treatment',
  field: 'treatments',
  look: (cable) => {
    const word = saidOf(cable, cold);
    return word === null
      ? null
      : `“${word}” is stated. Cold changes what copper or silver conducts while it is cold; afterwards nothing is known to remain.`;
  },
  reason:
    'Copper recovers when it is warmed, not when it is cooled: no recovery was found below 77 K. Steel, which changes its structure in the cold, is another metal. Resistance before and after, on the same piece, would show an effect.',
  source:
    'Measurements of residual resistance of copper worked in liquid helium and nitrogen, by their abstract; how it carries over to cables is common practice, no source',
};
