import { abx } from './abx.ts';
import type { Method } from './method.ts';

/** Every method, by the name that a protocol gives it. */
export const methods: { readonly [id: string]: Method } = { abx };

/** @throws RangeError for a method that this version does not have */
export function methodOf(id: string): Method {
  const method = Object.hasOwn(methods, id) ? methods[id] : undefined;
  if (method === undefined) throw new RangeError(`there is no method ${id}`);
  return method;
}
