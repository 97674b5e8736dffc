import { z } from 'zod';

/** Values on either side of a cue that told something, or courses one above the other. */
export const cuePicture = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('values'),
    /** What is measured, with its unit. */
    quantity: z.string(),
    sides: z.array(z.strictObject({ label: z.string(), values: z.array(z.number()) })),
  }),
  z.strictObject({
    kind: z.literal('courses'),
    rows: z.array(z.strictObject({ label: z.string(), marks: z.array(z.string()) })),
  }),
]);
export type CuePicture = z.output<typeof cuePicture>;

/** The cue audit as a report shows it. */
export const portrayedCueAudit = z.strictObject({
  /** What it comes to, in a sentence. */
  summary: z.string(),
  isFound: z.boolean(),
  found: z.array(z.strictObject({ words: z.string(), picture: cuePicture.nullable() })),
  /** A row for each cue; null where the question was not asked of it. */
  rows: z.array(
    z.strictObject({
      cue: z.string(),
      tells: z.string().nullable(),
      followed: z.string().nullable(),
      words: z.string(),
      isFound: z.boolean(),
    }),
  ),
});
export type PortrayedCueAudit = z.output<typeof portrayedCueAudit>;
