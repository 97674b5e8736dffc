import { predictedSkinEffect } from '../predicted-conductor.ts';
import { figureOf, type StatementRule, saidOf } from './statement-rule.ts';

const skin = /\b(skin[- ]?effect|litz|hollow|ribbon|strand(ed)? for treble)\b/i;
const littlePercent = 2;

export const skinEffectInThinWire: StatementRule = {
  id: 'skin-effect-in-thin-wire',
  title: 'Skin effect where there is none',
  field: 'build',
  look: (cable) => {
    const { construction } = cable;
    const word = construction.build === 'litz' ? 'litz' : saidOf(cable, skin);
    if (word === null) return null;
    const solid = predictedSkinEffect({ ...construction, build: 'solid' }, 20_000);
    if (!solid.isKnown) return null;
    const percent = (solid.value.resistanceRatio - 1) * 100;
    if (percent >= littlePercent) return null;
    return `“${word}” is stated. A solid wire of this cross-section has ${percent < 0.1 ? 'less than 0.1' : figureOf(percent)} % more resistance at 20 kHz: there is next to nothing to avoid.`;
  },
  reason:
    'Current crowds to the surface where a conductor is thick against the skin depth, 0.47 mm in copper at 20 kHz. In thinner wire it fills the whole of it.',
  source:
    'Rosa & Grover, Bulletin of the Bureau of Standards 8 (1912), section 8; the limit of 2 % is common practice, no source',
};
