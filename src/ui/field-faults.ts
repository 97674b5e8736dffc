import { createContext } from 'react';

/**
 * What is wrong with the field of this name, if anything. `Form` provides it, so that a field inside a form
 * finds its own fault, and a field outside one works without any form library.
 */
export const FieldFaults = createContext<(name: string) => string | undefined>(() => undefined);
