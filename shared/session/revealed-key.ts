import { z } from 'zod';

// The one shape in which the two secrets ever leave the server: the payload of `key-revealed`, after closing.
// Nothing that travels before closing may import this file (tests/guards/blind.test.ts).

const hex = (bytes: number) => z.string().regex(new RegExp(`^[0-9a-f]{${bytes * 2}}$`));

export const revealedKey = z.strictObject({
  codeKey: z.strictObject({
    salt: hex(32),
    /** In the protocol's order of specimens. */
    rows: z.array(z.strictObject({ code: z.string(), specimen: z.uuid(), serial: z.string(), cable: z.int() })),
  }),
  draws: z.array(
    z.strictObject({
      session: z.int(),
      secret: hex(32),
      salt: hex(32),
    }),
  ),
});
export type RevealedKey = z.output<typeof revealedKey>;
