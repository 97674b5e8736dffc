import { type StatementRule, saidOf } from './statement-rule.ts';

const words =
  /\b(direction(al|ality)|arrow(s)? (show|mark|point)\w*|burn(ed|t)?[- ]?in|break[- ]?in|run[- ]?in|conditioned|settl(ed?|ing)( in)?)\b/i;

export const directionAndSettling: StatementRule = {
  id: 'direction-and-settling',
  title: 'Direction, hours of use',
  field: 'treatments',
  look: (cable) => {
    const word = saidOf(cable, words);
    return word === null
      ? null
      : `“${word}” is stated. A cable of one metal is the same from both ends, and no change of its resistance, inductance or capacitance by hours of use is known.`;
  },
  reason:
    'A passive line is reciprocal. A shield that is joined at one end only has a direction, and that is said in the field of the shield. What hours of use do can be measured before and after on the same piece, and compared blind.',
  source:
    'Reciprocity: Pozar, Microwave Engineering, 4th ed. (2012), section 4.2; hours of use: common practice, no source',
};
