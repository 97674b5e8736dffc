import { z } from 'zod';
import { type Construction, construction } from '#shared/contracts/construction.ts';

const numbers = [
  'percentIacs',
  'strands',
  'strandDiameterMm',
  'areaMm2',
  'conductorsPerLeg',
  'permittivity',
  'spacingMm',
  'pitchMm',
  'shieldDiameterMm',
  'outsideMm',
  'shieldAreaMm2',
] as const satisfies (keyof Construction)[];

export type ConstructionValues = Record<keyof Construction, string>;

/** As typed, in the contract's kinds of value; what is empty is left out. */
function kindsOf(values: ConstructionValues): Record<string, unknown> {
  const filled = Object.entries(values)
    .map(([name, value]) => [name, value.trim()] as const)
    .filter(([, value]) => value !== '');
  return Object.fromEntries(
    filled.map(([name, value]) => [name, numbers.some((each) => each === name) ? Number(value) : value]),
  );
}

export const typedConstruction = z
  .custom<ConstructionValues>((values) => typeof values === 'object')
  .transform(kindsOf)
  .pipe(construction);

/** What can be read of a form that is still being filled in: every field that is sound by itself. */
export function soundConstruction(values: ConstructionValues): Construction {
  const typed = kindsOf(values);
  const read = construction.safeParse(typed);
  if (read.success) return read.data;
  const faulty = new Set(read.error.issues.map(({ path }) => path[0]));
  return construction.parse(Object.fromEntries(Object.entries(typed).filter(([name]) => !faulty.has(name))));
}

export function constructionValuesOf(made: Construction): ConstructionValues {
  const names = Object.keys(construction.shape) as (keyof Construction)[];
  return Object.fromEntries(names.map((name) => [name, String(made[name] ?? '')])) as ConstructionValues;
}
