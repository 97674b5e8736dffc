import { conductorDiameterMm, contradictionsOf } from '#shared/cables/contradictions.ts';
import type { Construction } from '#shared/contracts/construction.ts';

export interface Disc {
  readonly x: number;
  readonly y: number;
  readonly radius: number;
}

/** A cut through a cable; all in millimetres about its centre. */
export interface CrossSectionLayout {
  readonly go: readonly Disc[];
  readonly back: readonly Disc[];
  /** Inner edge of a coaxial shield. */
  readonly shieldRadius?: number;
  readonly outsideRadius?: number;
  /** Half of the width that holds all of it. */
  readonly extent: number;
  /** Half of the height. */
  readonly height: number;
}

/** Beyond it strands are dots that no screen shows; the conductor is then one disc. */
const mostStrands = 400;

/** Where conductors and strands lie, to scale; undefined where size or place is not stated, or would overlap. */
export function crossSectionLayout(construction: Construction): CrossSectionLayout | undefined {
  const { geometry, spacingMm, shieldDiameterMm, outsideMm, conductorsPerLeg } = construction;
  const diameter = conductorDiameterMm(construction);
  if (diameter === undefined || contradictionsOf(construction).length > 0) return undefined;
  const strands = strandsWithin(construction, roomOf(construction)) ?? [{ x: 0, y: 0, radius: diameter / 2 }];
  const at = (x: number, y: number) => conductorAt(strands, x, y);
  const isPair = geometry === 'parallel' || geometry === 'twisted-pair';
  if (isPair && spacingMm !== undefined && (conductorsPerLeg ?? 1) === 1)
    return framed({ go: at(-spacingMm / 2, 0), back: at(spacingMm / 2, 0), outsideMm });
  if (geometry === 'star-quad' && spacingMm !== undefined) {
    const far = spacingMm / 2;
    return framed({ go: [...at(-far, 0), ...at(far, 0)], back: [...at(0, -far), ...at(0, far)], outsideMm });
  }
  if (geometry === 'coaxial' && shieldDiameterMm !== undefined)
    return framed({ go: at(0, 0), back: [], shieldDiameterMm, outsideMm });
  return undefined;
}

const conductorAt = (discs: readonly Disc[], x: number, y: number): Disc[] =>
  discs.map((disc) => ({ ...disc, x: x + disc.x, y: y + disc.y }));

/** How far from its centre a conductor may reach without meeting another or the shield. */
function roomOf({ geometry, spacingMm = 0, shieldDiameterMm = 0 }: Construction): number {
  if (geometry === 'coaxial') return shieldDiameterMm / 2;
  return geometry === 'star-quad' ? spacingMm / Math.SQRT2 / 2 : spacingMm / 2;
}

/** The strands of a conductor; undefined where it has none, too many, or they do not fit laid like this. */
function strandsWithin({ build, strands, strandDiameterMm }: Construction, room: number): Disc[] | undefined {
  const isStranded = build === 'stranded' || build === 'litz';
  if (!isStranded || strands === undefined || strandDiameterMm === undefined || strands > mostStrands) return undefined;
  const discs = packed(strands, strandDiameterMm);
  return discs.every(({ x, y, radius }) => Math.hypot(x, y) + radius <= room) ? discs : undefined;
}

/** Strands laid as closely as they go, from the centre outwards. */
function packed(strands: number, diameter: number): Disc[] {
  const rings = Math.ceil(Math.sqrt(strands));
  const places: Disc[] = [];
  for (let row = -rings; row <= rings; row++)
    for (let column = -rings; column <= rings; column++)
      places.push({
        x: (column + row / 2) * diameter,
        y: row * diameter * (Math.sqrt(3) / 2),
        radius: diameter / 2,
      });
  return places.sort((one, other) => Math.hypot(one.x, one.y) - Math.hypot(other.x, other.y)).slice(0, strands);
}

type Parts = {
  go: readonly Disc[];
  back: readonly Disc[];
  shieldDiameterMm?: number | undefined;
  outsideMm?: number | undefined;
};

function framed({ go, back, shieldDiameterMm, outsideMm }: Parts): CrossSectionLayout {
  const shieldRadius = shieldDiameterMm === undefined ? undefined : shieldDiameterMm / 2;
  const outsideRadius = outsideMm === undefined ? undefined : outsideMm / 2;
  const around = Math.max(shieldRadius ?? 0, outsideRadius ?? 0);
  const furthest = (of: (disc: Disc) => number) => Math.max(around, ...[...go, ...back].map(of));
  return {
    go,
    back,
    shieldRadius,
    outsideRadius,
    extent: furthest(({ x, radius }) => Math.abs(x) + radius),
    height: furthest(({ y, radius }) => Math.abs(y) + radius),
  };
}
