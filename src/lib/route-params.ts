import { Problem } from '#shared/problem.ts';

/** A parameter that the route's own path guarantees. */
export function param(params: Readonly<Record<string, string | undefined>>, name: string): string {
  const value = params[name];
  if (value === undefined) throw new Problem('not-found', 'There is nothing at this address.');
  return value;
}
