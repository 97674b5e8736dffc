import { z } from 'zod';
import { forcedChoiceResult } from '../findings/forced-choice-result.ts';
import { preferenceResult } from '../findings/preference-result.ts';
import { sameDifferentResult } from '../findings/same-different-result.ts';
import { abx } from './abx.ts';
import { directionalComparison } from './directional-comparison.ts';
import { duoTrio } from './duo-trio.ts';
import type { Method } from './method.ts';
import { pairedPreference } from './paired-preference.ts';
import { sameDifferent } from './same-different.ts';
import { triangle } from './triangle.ts';

// The one place that lists the methods.

/** What a registered analysis comes to, as it stands on the record: one shape for all with one right answer. */
export const registeredResult = z.discriminatedUnion('method', [
  forcedChoiceResult,
  sameDifferentResult,
  preferenceResult,
]);
export type RegisteredResult = z.output<typeof registeredResult>;

export type MethodId = RegisteredResult['method'];

/** Every method, by the name that a protocol gives it. */
export const methods: { readonly [id in MethodId]: Method } = {
  abx,
  triangle,
  'duo-trio': duoTrio,
  'same-different': sameDifferent,
  'directional-comparison': directionalComparison,
  'paired-preference': pairedPreference,
};

export const methodIds = Object.keys(methods) as [MethodId, ...MethodId[]];

/** @throws RangeError for a method that this version does not have */
export function methodOf(id: string): Method {
  const known = methodIds.find((candidate) => candidate === id);
  if (known === undefined) throw new RangeError(`there is no method ${id}`);
  return methods[known];
}
