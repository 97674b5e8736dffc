import { figureOf, type StatementRule } from './statement-rule.ts';

const leastOfPure = 100;

export const purityAndConductivity: StatementRule = {
  id: 'purity-and-conductivity',
  title: 'Purity and conductivity',
  field: 'percentIacs',
  look: ({ construction: { material, nines, percentIacs } }) => {
    const isCopper = material?.startsWith('copper') && material !== 'copper-clad-aluminium';
    if (!isCopper || nines === undefined || percentIacs === undefined) return null;
    if (Number(nines[0]) < 4 || percentIacs >= leastOfPure) return null;
    return `Copper of ${nines} would conduct better than the ${figureOf(percentIacs)} % IACS that are stated.`;
  },
  reason:
    'Impurities lower conductivity. Annealed copper of four nines has at least 100 % IACS; less points to hard-drawn wire, or to a purity that is not there.',
  source: 'ASTM B170: C10100 at least 101 %, C10200 at least 100 % IACS, annealed',
};
