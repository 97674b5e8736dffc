import { z } from 'zod';
import { abxResult } from '../findings/abx-result.ts';
import { preferenceResult } from '../findings/preference-result.ts';
import { abx } from './abx.ts';
import type { Method } from './method.ts';
import { pairedPreference } from './paired-preference.ts';

// The one place that lists the methods.

/** What a registered analysis comes to, as it stands on the record: one shape per method. */
export const registeredResult = z.discriminatedUnion('method', [abxResult, preferenceResult]);
export type RegisteredResult = z.output<typeof registeredResult>;

export type MethodId = RegisteredResult['method'];

/** Every method, by the name that a protocol gives it. */
export const methods: { readonly [id in MethodId]: Method } = { abx, 'paired-preference': pairedPreference };

export const methodIds = Object.keys(methods) as [MethodId, ...MethodId[]];

/** @throws RangeError for a method that this version does not have */
export function methodOf(id: string): Method {
  const known = methodIds.find((candidate) => candidate === id);
  if (known === undefined) throw new RangeError(`there is no method ${id}`);
  return methods[known];
}
