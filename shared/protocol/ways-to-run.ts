import { z } from 'zod';
import { methodOf } from '../methods/methods.ts';

// How a study may register that its sessions are run, beside the usual way; each is left out where it is not chosen.

/** As it stands in the protocol and in a session's plan. */
export const waysToRun = {
  /** What is presented again within a trial is fitted from specimens, and under codes, of its own. */
  separateSpecimens: z.literal(true).optional(),
  /** A single listener asks for what is presented, at most so often in a trial; otherwise all hear a fixed order. */
  onRequest: z.strictObject({ most: z.int() }).optional(),
};

export type WaysToRun = {
  readonly separateSpecimens?: boolean | undefined;
  readonly onRequest?: { readonly most: number } | undefined;
};

/** Of what was chosen, only what is on. */
export function chosenWays({ separateSpecimens = false, onRequest }: WaysToRun) {
  return {
    ...(separateSpecimens ? { separateSpecimens: true as const } : {}),
    ...(onRequest === undefined ? {} : { onRequest: { most: onRequest.most } }),
  };
}

/** Separate specimens need two of each cable: one for either use. */
export const leastSeparate = 2;

type Draft = WaysToRun & {
  readonly method: string;
  readonly listenersPerSession: number;
  readonly cables: readonly { readonly specimenIds: readonly string[] }[];
};
type Fault = { readonly path: (string | number)[]; readonly message: string };

/** What stands against the ways that a draft chooses, at the field where it is mended. */
export const faultsOfWays = (draft: Draft): Fault[] => [...faultsOfSeparate(draft), ...faultsOfOnRequest(draft)];

function faultsOfOnRequest({ method: id, listenersPerSession, onRequest }: Draft): Fault[] {
  const method = methodOf(id);
  const least = method.presentations.length;
  if (onRequest === undefined) return [];
  if (method.onRequest === null)
    return [{ path: ['onRequest'], message: `In ${method.name} what is presented comes in a fixed order` }];
  return [
    ...(onRequest.most < least
      ? [{ path: ['onRequest', 'most'], message: `At least ${least}, so that each is heard once` }]
      : []),
    ...(listenersPerSession === 1
      ? []
      : [{ path: ['listenersPerSession'], message: 'Enter 1: on request there is a single listener in a session' }]),
  ];
}

function faultsOfSeparate({ method: id, cables, separateSpecimens = false }: Draft): Fault[] {
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
export function waysFacts({ separateSpecimens = false, onRequest }: WaysToRun): { label: string; value: string }[] {
  return [
    ...(separateSpecimens
      ? [{ label: 'Fitting', value: 'from separate specimens: no code comes twice in a trial' }]
      : []),
    ...(onRequest === undefined
      ? []
      : [
          {
            label: 'Order',
            value: `on request of a single listener, at most ${onRequest.most} presentations in a trial, each heard at least once`,
          },
        ]),
  ];
}
