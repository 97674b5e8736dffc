import { conductorMetal } from '../conductor-metal.ts';
import { conductorAreaMm2 } from '../contradictions.ts';
import { figureOf, type StatementRule } from './statement-rule.ts';

export const silverByTheArea: StatementRule = {
  id: 'silver-by-the-area',
  title: 'Silver, or more copper',
  field: 'material',
  look: ({ construction }) => {
    if (construction.material !== 'silver') return null;
    const percent = conductorMetal(construction)?.percentIacs ?? 0;
    if (percent <= 100) return null;
    const area = conductorAreaMm2(construction);
    const more = `${figureOf(percent - 100)} % more cross-section`;
    return area === undefined
      ? `Copper conducts as well with ${more}.`
      : `Copper of ${figureOf((area * percent) / 100)} mm² conducts as well as this silver of ${figureOf(area)} mm²: ${more}.`;
  },
  reason:
    'Resistance is resistivity over area. What silver saves, a cross-section a few per cent larger saves too, which is less than half a step of wire gauge.',
  source: 'IEC 60028 (100 % IACS); silver 1.59e-8 Ω m at 20 °C, from memory',
};
