import type { Construction } from '#shared/contracts/construction.ts';

/** What a conductor's metal is taken to be when nothing else is stated. */
export interface ConductorMetal {
  readonly percentIacs: number;
  /** Whether the wire is one metal throughout, so that the round-wire solution holds. */
  readonly isUniform: boolean;
  readonly source: string;
}

const metals: { readonly [material in NonNullable<Construction['material']>]?: ConductorMetal } = {
  'copper-ofe': { percentIacs: 101, isUniform: true, source: 'ASTM B170, C10100: at least 101 % IACS' },
  'copper-of': { percentIacs: 100, isUniform: true, source: 'ASTM B170, C10200: at least 100 % IACS' },
  'copper-etp': { percentIacs: 100, isUniform: true, source: 'IEC 60028 and ASTM B49, C11000: 100 % IACS' },
  'copper-long-crystal': {
    percentIacs: 101,
    isUniform: true,
    source: 'as oxygen-free electronic copper; common practice, no source',
  },
  copper: { percentIacs: 100, isUniform: true, source: 'IEC 60028: annealed copper' },
  silver: { percentIacs: 108.4, isUniform: true, source: '1.59e-8 ohm m at 20 °C; makers state 105 to 108 % IACS' },
  'silver-plated-copper': {
    percentIacs: 100,
    isUniform: true,
    source: 'as copper: the plating is a few micrometres; common practice, no source',
  },
  'copper-clad-aluminium': {
    percentIacs: 64.9,
    isUniform: false,
    source: 'a tenth of the area copper, the rest aluminium of 61 % IACS',
  },
  aluminium: { percentIacs: 61, isUniform: true, source: 'IEC 60889: aluminium for conductors, 61 % IACS' },
};

/**
 * The conductivity of a construction at 20 °C: as stated, else that of its material.
 *
 * @returns undefined when neither tells
 * @example conductorMetal({ material: 'copper-ofe' })?.percentIacs // 101
 */
export function conductorMetal({ material, percentIacs }: Construction): ConductorMetal | undefined {
  const usual = material === undefined ? undefined : metals[material];
  if (percentIacs === undefined) return usual;
  return { percentIacs, isUniform: usual?.isUniform ?? true, source: 'as stated' };
}
