import { makeDemo } from './run-fairlead.ts';

/** Runs once before all browser tests; what it returns runs after them. */
export default makeDemo;
