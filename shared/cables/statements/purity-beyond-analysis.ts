import type { StatementRule } from './statement-rule.ts';

const most = 5;

export const purityBeyondAnalysis: StatementRule = {
  id: 'purity-beyond-analysis',
  title: 'Purity beyond usual analysis',
  field: 'nines',
  look: ({ construction: { nines } }) =>
    nines === undefined || Number(nines[0]) < most
      ? null
      : `${nines} is stated. The usual analysis of copper does not tell such purities apart.`,
  reason:
    'Determination by weighing covers copper of 99.75 to 99.95 %. Five nines and more are the sum of what was not found, by a method that looks for every element, and depend on which elements, gases included, were looked for.',
  source:
    'Scope of ASTM E53, Determination of Copper in Unalloyed Copper by Gravimetry; the limit of five nines is common practice, no source',
};
