import { FirstSchema1796083200000 } from './1796083200000-first-schema.ts';
import { Publications1796126400000 } from './1796126400000-publications.ts';

/** Every migration, oldest first. */
export const migrations = [FirstSchema1796083200000, Publications1796126400000];
