import { conductorResistance } from '#shared/cables/dc-resistance.ts';
import { levelAt } from '#shared/cables/level-difference.ts';
import { coaxialLine, type PerMetre, parallelWires } from '#shared/cables/line-geometry.ts';
import type { Load } from '#shared/cables/load.ts';
import { resistivityFromIacs } from '#shared/cables/resistivity.ts';
import { internalInductanceAtDc, roundWireSkinEffect, skinEffect } from '#shared/cables/round-wire.ts';
import { skinDepth } from '#shared/cables/skin-depth.ts';
import { areaOfDiameter, diameterOfGauge } from '#shared/cables/wire-gauge.ts';
import type { Mapping } from './check-records.ts';
import { of } from './inputs.ts';

const millimetre = 1e-3;

interface StoredLine {
  readonly R: string;
  readonly L: string;
  readonly G: string;
  readonly C: string;
}

interface StoredLoad {
  readonly type: 'resistor' | 'seriesRL' | 'parallelRC';
  readonly r: number;
  readonly l: number;
  readonly c: number;
}

function loadOf({ type, r, l, c }: StoredLoad): Load {
  if (type === 'seriesRL') return { type: 'series-rl', resistance: r, inductance: l };
  if (type === 'parallelRC') return { type: 'parallel-rc', resistance: r, capacitance: c };
  return { type: 'resistor', resistance: r };
}

const lineOf = ({ R, L, G, C }: StoredLine, length: number) => ({
  constantsAt: () => ({ resistance: Number(R), inductance: Number(L), conductance: Number(G), capacitance: Number(C) }),
  length,
});

const perMetre = ({ externalInductance, capacitance }: PerMetre) => ({
  relative: { externalLPerMetre: externalInductance, cPerMetre: capacitance },
});

/** Functions of the check values about cables. */
export const physicsMappings: { readonly [fn: string]: Mapping } = {
  skinDepth: of<{ resistivity: number; frequency: number; relativePermeability: number }>((wire) => ({
    relative: { depth: skinDepth(wire.resistivity, wire.frequency, wire.relativePermeability) },
  })),

  awgWire: of<{ awg: number; resistivity: number }>(({ awg, resistivity }) => {
    const diameter = diameterOfGauge(awg);
    const area = areaOfDiameter(diameter);
    return { relative: { diameter, area, ohmsPerMetre: conductorResistance(resistivity, area) } };
  }),

  resistivityFromIacs: of<{ percentIacs: number; temperatureC: number; alpha20: number }>((metal) => ({
    relative: { resistivity: resistivityFromIacs(metal.percentIacs, metal.temperatureC, metal.alpha20) },
  })),

  roundWireAc: of<{ diameterMm: number; resistivity: number; frequency: number }>(
    ({ diameterMm, resistivity, frequency }) => {
      const diameter = diameterMm * millimetre;
      const rdcPerMetre = conductorResistance(resistivity, areaOfDiameter(diameter));
      const { resistanceRatio, internalInductanceRatio } = roundWireSkinEffect(diameter, resistivity, frequency);
      return {
        relative: {
          rdcPerMetre,
          racPerMetre: rdcPerMetre * resistanceRatio,
          racOverRdc: resistanceRatio,
          internalInductancePerMetre: internalInductanceAtDc * internalInductanceRatio,
          skinDepth: skinDepth(resistivity, frequency),
        },
      };
    },
  ),

  skinEffectRatio: of<{ x: number }>(({ x }) => {
    const { resistanceRatio, internalInductanceRatio } = skinEffect(x);
    return {
      relative: {
        racOverRdc: resistanceRatio,
        aOverDelta: x / Math.SQRT2,
        inductanceOverDc: internalInductanceRatio,
      },
    };
  }),

  parallelPair: of<{ spacingMm: number; wireDiameterMm: number; relativePermittivity: number }>((pair) =>
    perMetre(parallelWires(pair.spacingMm * millimetre, pair.wireDiameterMm * millimetre, pair.relativePermittivity)),
  ),

  coax: of<{ shieldInnerMm: number; coreMm: number; relativePermittivity: number }>((line) =>
    perMetre(coaxialLine(line.shieldInnerMm * millimetre, line.coreMm * millimetre, line.relativePermittivity)),
  ),

  cableLevelDifference: of<{
    cable1: StoredLine;
    cable2: StoredLine;
    lengthMetres: number;
    frequency: number;
    sourceOhms: number;
    load: StoredLoad;
  }>(({ cable1, cable2, lengthMetres, frequency, sourceOhms, load }) => {
    const circuit = { sourceOhms, load: loadOf(load) };
    const levelDb1 = levelAt(lineOf(cable1, lengthMetres), circuit, frequency);
    const levelDb2 = levelAt(lineOf(cable2, lengthMetres), circuit, frequency);
    // A difference in dB is a logarithm; it may be 1e-7 of the levels it is between.
    return { relative: { levelDb1, levelDb2 }, scaled: { differenceDb: levelDb1 - levelDb2 } };
  }),
};
