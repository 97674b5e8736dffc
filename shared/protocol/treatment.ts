import { z } from 'zod';

// A study of what something does to a cable: pieces of one cable, some of which were treated and some not. The second of the
// protocol's two cables stands for the treated pieces.

export const treatmentKinds = ['conditioning', 'cold', 'hours-of-use', 'other'] as const;

const text = (most: number) => z.string().trim().max(most, `At most ${most} characters`);

/** What is done to the pieces of the second group, by whom, for how long and with what. */
export const treatment = z.strictObject({
  kind: z.enum(treatmentKinds, 'Choose what is done'),
  what: text(400).min(3, 'Say what is done to the pieces'),
  by: text(120).min(2, 'Name who does it'),
  duration: text(80).min(1, 'Say for how long'),
  /** What runs through the pieces meanwhile; empty where nothing does. */
  signal: text(200),
});
export type Treatment = z.output<typeof treatment>;

export const treatmentWords: Record<Treatment['kind'], string> = {
  conditioning: 'Conditioning',
  cold: 'Cold treatment',
  'hours-of-use': 'Hours of use',
  other: 'Other treatment',
};

type Chosen = { readonly cableId: string; readonly specimenIds: readonly string[] };
type Draft = { readonly cables: readonly [Chosen, Chosen]; readonly treatment?: Treatment | undefined };
type Fault = { readonly path: (string | number)[]; readonly message: string };

/** What stands against the two cables of a draft: two different ones, or with a treatment different pieces of one. */
export function faultsOfCables({ cables: [first, second], treatment: done }: Draft): Fault[] {
  const isSame = first.cableId === second.cableId;
  if (done === undefined)
    return isSame ? [{ path: ['cables', 1, 'cableId'], message: 'Choose two different cables' }] : [];
  if (!isSame)
    return [
      { path: ['cables', 1, 'cableId'], message: 'A treatment is compared on pieces of one cable: choose it twice' },
    ];
  return second.specimenIds.some((id) => first.specimenIds.includes(id))
    ? [{ path: ['cables', 1, 'specimenIds'], message: 'A piece is either treated or not: choose others than above' }]
    : [];
}

/** The name under which a study knows one of its two cables. */
export function nameInStudy(name: string, index: 0 | 1, done: Treatment | undefined): string {
  if (done === undefined) return name;
  return `${name}, ${index === 0 ? 'untreated' : 'treated'}`;
}

/** A treatment as it is read on a page, line by line; nothing without one. */
export function treatmentFacts(done: Treatment | undefined): { label: string; value: string }[] {
  if (done === undefined) return [];
  const { kind, what, by, duration, signal } = done;
  return [
    { label: 'Treatment', value: `${treatmentWords[kind]}: ${what}` },
    { label: 'Treated by', value: by },
    { label: 'For how long', value: duration },
    { label: 'With what signal', value: signal === '' ? 'none' : signal },
  ];
}
