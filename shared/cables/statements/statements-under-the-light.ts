import { contradictionsOf } from '../contradictions.ts';
import { beyondTheBand } from './beyond-the-band.ts';
import { coldTreatment } from './cold-treatment.ts';
import { crystalAfterDrawing } from './crystal-after-drawing.ts';
import { directionAndSettling } from './direction-and-settling.ts';
import { platingCarriesLittle } from './plating-carries-little.ts';
import { purityAndConductivity } from './purity-and-conductivity.ts';
import { purityBeyondAnalysis } from './purity-beyond-analysis.ts';
import { purityBeyondGrade } from './purity-beyond-grade.ts';
import { silverByTheArea } from './silver-by-the-area.ts';
import { skinEffectInThinWire } from './skin-effect-in-thin-wire.ts';
import type { StatedCable, StatementRule } from './statement-rule.ts';

/** Every rule about statements, in the order in which they are shown. */
export const statementRules: readonly StatementRule[] = [
  purityBeyondGrade,
  purityBeyondAnalysis,
  purityAndConductivity,
  silverByTheArea,
  platingCarriesLittle,
  crystalAfterDrawing,
  coldTreatment,
  directionAndSettling,
  skinEffectInThinWire,
  beyondTheBand,
];

/** A statement that a rule holds under the light. */
export interface StatementUnderTheLight extends Pick<StatementRule, 'title' | 'field' | 'reason' | 'source'> {
  /** The rule's id; evidence is filed under it. */
  readonly rule: string;
  readonly detail: string;
}

const fieldsThatContradict = 'fields-that-contradict';

/**
 * What of a cable's statements is held under the light: by the rules, and where fields contradict one another.
 *
 * @example statementsUnderTheLight(silver of 1 mm²)[0]?.detail // "Copper of 1.08 mm² conducts as well ..."
 */
export function statementsUnderTheLight(cable: StatedCable): StatementUnderTheLight[] {
  const byRule = statementRules.flatMap(({ id, title, field, look, reason, source }) => {
    const detail = look(cable);
    return detail === null ? [] : [{ rule: id, title, field, detail, reason, source }];
  });
  const contradictions = contradictionsOf(cable.construction).map(({ field, detail }) => ({
    rule: `${fieldsThatContradict}-${field}`,
    title: 'Two fields contradict each other',
    field,
    detail: `${detail}.`,
    reason: 'Both cannot hold: one of them is mistyped, or means something else.',
    source: 'Geometry',
  }));
  return [...contradictions, ...byRule];
}
