import type { Construction } from '#shared/contracts/construction.ts';
import type { StatementRule } from './statement-rule.ts';

/** Least purity of a trade grade, in its nines. */
const grades: { readonly [material in NonNullable<Construction['material']>]?: { nines: number; words: string } } = {
  'copper-etp': { nines: 3, words: 'tough-pitch copper (C11000) is a grade of 99.90 %' },
  'copper-of': { nines: 3.5, words: 'oxygen-free copper (C10200) is a grade of 99.95 %' },
  'copper-ofe': { nines: 4, words: 'oxygen-free electronic copper (C10100) is a grade of 99.99 %' },
};

/** 4N5 as 4.5, so that grades can be ordered. */
const countOf = (nines: string) => Number(nines.replace(/N(\d)?$/, (_, last?: string) => `.${last ?? 0}`));

export const purityBeyondGrade: StatementRule = {
  id: 'purity-beyond-grade',
  title: 'Purity beyond the grade',
  field: 'nines',
  look: ({ construction: { material, nines } }) => {
    const grade = material === undefined ? undefined : grades[material];
    if (grade === undefined || nines === undefined || countOf(nines) <= grade.nines) return null;
    return `${nines} is stated, while ${grade.words}: the grade does not support it.`;
  },
  reason:
    'A grade says what its copper has at least. More than that is a statement of its own and needs an analysis of this very batch.',
  source: 'ASTM B170 (C10100, C10200) and ASTM B49 (C11000)',
};
