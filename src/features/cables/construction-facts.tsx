import { purityPercent } from '#shared/cables/purity.ts';
import { diameterOfArea, gaugeOfDiameter } from '#shared/cables/wire-gauge.ts';
import type { Construction } from '#shared/contracts/construction.ts';
import { formatNumber, withUnit } from '../../lib/format.ts';
import { type Fact, Facts } from '../../ui/facts.tsx';
import { buildWords, constructionLabels, geometryWords, materialWords, shieldWords } from './construction-words.ts';

const figure = (value: number, unit = '') =>
  unit === '' ? formatNumber(value, 4) : withUnit(formatNumber(value, 4), unit);

type ConstructionFactsProps = {
  construction: Construction;
  /** Where a page has several: whose it is. */
  title?: string;
};

/** The construction as it was typed, and nothing of what was not. */
export function ConstructionFacts({ construction, title = 'Construction' }: ConstructionFactsProps) {
  const facts = (Object.keys(constructionLabels) as (keyof Construction)[]).flatMap((name) => {
    const value = shown[name](construction);
    return value === undefined ? [] : [{ label: constructionLabels[name], ...value }];
  });
  if (facts.length === 0) return null;
  return <Facts title={title} facts={facts} />;
}

type Shown = Pick<Fact, 'value' | 'isWords'> | undefined;
const words = (text: string | undefined): Shown =>
  text === undefined || text === '' ? undefined : { value: text, isWords: true };
const measured = (value: number | undefined, unit = ''): Shown =>
  value === undefined ? undefined : { value: figure(value, unit) };
const gauge = (areaMm2: number) => `AWG ${formatNumber(gaugeOfDiameter(diameterOfArea(areaMm2 * 1e-6)), 1)}`;

const shown: Record<keyof Construction, (made: Construction) => Shown> = {
  material: ({ material }) => words(material && materialWords[material]),
  nines: ({ nines }) => (nines ? { value: `${nines}, ${purityPercent(nines)} %` } : undefined),
  percentIacs: ({ percentIacs }) => measured(percentIacs, '% IACS'),
  build: ({ build }) => words(build && buildWords[build]),
  strands: ({ strands }) => measured(strands),
  strandDiameterMm: ({ strandDiameterMm }) => measured(strandDiameterMm, 'mm'),
  areaMm2: ({ areaMm2 }) =>
    areaMm2 === undefined ? undefined : { value: `${figure(areaMm2, 'mm²')}, ${gauge(areaMm2)}` },
  conductorsPerLeg: ({ conductorsPerLeg }) => measured(conductorsPerLeg),
  insulation: ({ insulation }) => words(insulation),
  permittivity: ({ permittivity }) => measured(permittivity),
  geometry: ({ geometry }) => words(geometry && geometryWords[geometry]),
  spacingMm: ({ spacingMm }) => measured(spacingMm, 'mm'),
  pitchMm: ({ pitchMm }) => measured(pitchMm, 'mm'),
  shieldDiameterMm: ({ shieldDiameterMm }) => measured(shieldDiameterMm, 'mm'),
  outsideMm: ({ outsideMm }) => measured(outsideMm, 'mm'),
  shield: ({ shield }) => words(shield && shieldWords[shield]),
  shieldAreaMm2: ({ shieldAreaMm2 }) => measured(shieldAreaMm2, 'mm²'),
  connectors: ({ connectors }) => words(connectors),
  treatments: ({ treatments }) => words(treatments),
};
