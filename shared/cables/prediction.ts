import type { Construction } from '#shared/contracts/construction.ts';

/** A value that follows from a construction, or what stands in its way. */
export type Prediction<Value> =
  | { readonly isKnown: true; readonly value: Value }
  | {
      readonly isKnown: false;
      /** Fields that would have to be filled in. */
      readonly lacks: readonly (keyof Construction)[];
      /** Why it cannot be said, where no field would help. */
      readonly because?: string;
    };

export const known = <Value>(value: Value): Prediction<Value> => ({ isKnown: true, value });

export const lacking = (...lacks: (keyof Construction)[]): Prediction<never> => ({ isKnown: false, lacks });

export const unknownBecause = (because: string): Prediction<never> => ({ isKnown: false, lacks: [], because });
