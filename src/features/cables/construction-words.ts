import type { Construction } from '#shared/contracts/construction.ts';

type Words<Key extends keyof Construction> = Record<NonNullable<Construction[Key]> & string, string>;

export const materialWords: Words<'material'> = {
  'copper-ofe': 'Copper, oxygen-free (OFE, C10100)',
  'copper-of': 'Copper, oxygen-free (OF, C10200)',
  'copper-etp': 'Copper, tough-pitch (ETP, C11000)',
  'copper-long-crystal': 'Copper, continuously cast in long crystals',
  copper: 'Copper, grade not stated',
  silver: 'Silver',
  'silver-plated-copper': 'Copper, silver-plated',
  'copper-clad-aluminium': 'Aluminium, copper-clad',
  aluminium: 'Aluminium',
  other: 'Other',
};

export const buildWords: Words<'build'> = { solid: 'Solid', stranded: 'Stranded', litz: 'Litz: insulated strands' };

export const geometryWords: Words<'geometry'> = {
  parallel: 'Parallel',
  'twisted-pair': 'Twisted pair',
  'star-quad': 'Star quad',
  braided: 'Braided',
  coaxial: 'Coaxial',
};

export const shieldWords: Words<'shield'> = {
  none: 'None',
  foil: 'Foil',
  braid: 'Braid',
  'foil-and-braid': 'Foil and braid',
  other: 'Other',
};

export const constructionLabels: Record<keyof Construction, string> = {
  material: 'Conductor',
  nines: 'Stated purity',
  percentIacs: 'Stated conductivity',
  build: 'Solid or stranded',
  strands: 'Strands',
  strandDiameterMm: 'Strand diameter',
  areaMm2: 'Cross-section',
  conductorsPerLeg: 'Conductors in each leg',
  insulation: 'Insulation',
  permittivity: 'Relative permittivity',
  geometry: 'Geometry',
  spacingMm: 'Spacing of centres',
  pitchMm: 'Length of one turn',
  shieldDiameterMm: 'Inside of the shield',
  outsideMm: 'Outside diameter',
  shield: 'Shield',
  shieldAreaMm2: 'Cross-section of the shield',
  connectors: 'Connectors',
  treatments: 'Stated treatments',
};
