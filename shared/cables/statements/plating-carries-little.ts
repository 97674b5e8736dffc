import { type StatementRule, saidOf } from './statement-rule.ts';

const claimed = /\b(treble|high(er)? frequenc\w+|skin[- ]?effect|silver (layer|surface))\b/i;

export const platingCarriesLittle: StatementRule = {
  id: 'plating-carries-little',
  title: 'What a plating carries',
  field: 'material',
  look: (cable) => {
    if (cable.construction.material !== 'silver-plated-copper') return null;
    const word = saidOf(cable, claimed);
    return word === null
      ? null
      : `“${word}” is stated of silver-plated copper. A plating of a few micrometres is less than a hundredth of the skin depth at 20 kHz.`;
  },
  reason:
    'At 20 kHz the skin depth in copper is 0.47 mm: the current flows in the copper beneath. A plating keeps the surface solderable and withstands heat; at radio frequencies it conducts.',
  source:
    'Ramo, Whinnery & Van Duzer, Fields and Waves in Communication Electronics, 3rd ed. (1994), section 3.16; the usual thickness of platings: common practice, no source',
};
