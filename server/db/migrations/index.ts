import { FirstSchema1796083200000 } from './1796083200000-first-schema.ts';

/** Every migration, oldest first. */
export const migrations = [FirstSchema1796083200000];
