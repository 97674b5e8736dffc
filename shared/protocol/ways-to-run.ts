import { z } from 'zod';
import { methodOf } from '../methods/methods.ts';

// How a study may register that its sessions are run, beside the usual way; each is left out where it is not chosen.

/** As it stands in the protocol and in a session's plan. */
export const waysToRun = {
  /** What is presented again within a trial is fitted from specimens, and under codes, of its own. */
  separateSpecimens: z.literal(true).optional(),
};

export type WaysToRun = { readonly separateSpecimens?: boolean | undefined };

/** Of what was ticked, only what is on. */
export function chosenWays({ separateSpecimens = false }: WaysToRun): { separateSpecimens?: true } {
  return { ...(separateSpecimens ? { separateSpecimens: true as const } : {}) };
}

/** Separate specimens need two of each cable: one for either use. */
export const leastSeparate = 2;

type Draft = WaysToRun & {
  readonly method: string;
  readonly cables: readonly { readonly specimenIds: readonly string[] }[];
};
type Fault = { readonly path: (string | number)[]; readonly message: string };

/** What stands against the ways that a draft chooses, at the field where it is mended. */
export function faultsOfWays({ method: id, cables, separateSpecimens = false }: Draft): Fault[] {
  const method = methodOf(id);
  if (!separateSpecimens) return [];
  if (method.separate === null)
    return [
      {
        path: ['separateSpecimens'],
        message: `In ${method.name} no code comes twice in a trial: there is nothing to hide by separate specimens`,
      },
    ];
  return cables.flatMap(({ specimenIds }, index) =>
    specimenIds.length === 0 || specimenIds.length >= leastSeparate
      ? []
      : [
          {
            path: ['cables', index, 'specimenIds'],
            message: 'Choose at least two: separate specimens need two of each cable',
          },
        ],
  );
}

/** The same as it is read on a page, line by line. */
export function waysFacts({ separateSpecimens = false }: WaysToRun): { label: string; value: string }[] {
  return separateSpecimens ? [{ label: 'Specimens', value: 'separate: no code comes twice in a trial' }] : [];
}
