import { z } from 'zod';
import type { CheckShape } from '../session/trial-kinds.ts';
import { mostSteps } from '../session/trial-kinds.ts';
import { type ProtocolCable, protocolCable } from './protocol-cable.ts';

/** The registered check trials, as sealed: the largest difference first. */
export const protocolChecks = z.strictObject({
  /** The protocol's cable that check cables are compared with. */
  reference: z.union([z.literal(0), z.literal(1)]),
  steps: z
    .array(z.strictObject({ milliDb: z.int().min(1), trials: z.int().min(1), cable: protocolCable }))
    .max(mostSteps),
  /** Trials of the reference cable with itself. */
  same: z.int().min(0),
});
export type ProtocolChecks = z.output<typeof protocolChecks>;

type Drafted = {
  readonly reference: 0 | 1;
  readonly steps: readonly { readonly milliDb: number; readonly trials: number; readonly cableId: string }[];
  readonly same: number;
};

/** The check trials of a draft with their cables spelt out. */
export function checksFromDraft(
  { reference, steps, same }: Drafted,
  cableOf: (step: { readonly cableId: string }) => ProtocolCable,
): ProtocolChecks {
  return {
    reference,
    steps: [...steps]
      .sort((a, b) => b.milliDb - a.milliDb)
      .map((step) => ({ milliDb: step.milliDb, trials: step.trials, cable: cableOf(step) })),
    same,
  };
}

/** What a session's plan says of them: counts alone. */
export function shapeOf({ reference, steps, same }: ProtocolChecks): CheckShape {
  return { reference, steps: steps.map(({ trials }) => trials), same };
}

/** A size as people read it: 500 is "0.5 dB". */
export const decibels = (milliDb: number): string => `${milliDb / 1000}\u00a0dB`;

/** The check trials in a line: "6 of 1 dB, 6 of 0.5 dB, 2 of the same with the same, in each session, against ...". */
export function checksWords(
  { reference, steps, same }: ProtocolChecks,
  cables: readonly { readonly name: string }[],
): string {
  const parts = [
    ...steps.map(({ milliDb, trials, cable }) => `${trials} of ${decibels(milliDb)} (${cable.name})`),
    ...(same === 0 ? [] : [`${same} of the same with the same`]),
  ];
  return `${parts.join(', ')}, in each session, against ${cables[reference]?.name ?? ''}`;
}
