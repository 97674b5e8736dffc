import { type StatementRule, saidOf } from './statement-rule.ts';

const annealed = /\banneal\w*/i;

export const crystalAfterDrawing: StatementRule = {
  id: 'crystal-after-drawing',
  title: 'Long crystals and annealing',
  field: 'treatments',
  look: (cable) => {
    if (cable.construction.material !== 'copper-long-crystal') return null;
    const word = saidOf(cable, annealed);
    return word === null ? null : `Long crystals and “${word}” are both stated. Annealing makes new, small grains.`;
  },
  reason:
    'Wire that was cast in long crystals and then drawn recrystallises when it is annealed, from some 150 to 200 °C on: the crystals of the casting are gone.',
  source: 'Dong et al., Journal of Materials Research and Technology 26 (2023), 1459',
};
