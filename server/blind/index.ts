// The gate to the two secrets: nothing else in this folder may be imported from outside it (tests/guards/imports.test.ts).
export { commitCodeKey, commitDraw, drawCodes, type SpecimenToCode, voidCodeKey } from './commit.ts';
export { type CueQuestion, codesOf, cueFor, truthPractised } from './cue.ts';
export { codesToMeasure } from './measured-codes.ts';
export { openForHolder, reveal } from './open.ts';
