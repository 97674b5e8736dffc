import * as z from 'zod/mini';
import type * as core from 'zod/v4/core';

/** The roles of a member of an organisation. */
export const roles = ['owner', 'manager', 'proctor', 'reviewer'] as const;
export type Role = (typeof roles)[number];

/**
 * Who may call an endpoint: anyone at all, the holder of a seat's token, whoever is signed in,
 * or members of the organisation in the path with one of the listed roles.
 */
export type Access = 'anyone' | 'signed-in' | readonly Role[];

export const allMembers = roles;
export const managers = ['owner', 'manager'] as const satisfies readonly Role[];
export const crew = ['owner', 'manager', 'proctor'] as const satisfies readonly Role[];

type Schema = core.$ZodType;

export type Endpoint<
  P extends Schema = Schema,
  Q extends Schema = Schema,
  B extends Schema = Schema,
  R extends Schema = Schema,
> = {
  method: 'GET' | 'POST' | 'PUT' | 'DELETE';
  /** Below `/api`; parameters as `:name`. */
  path: string;
  /** What it does, in a few words; shown in the API reference. */
  summary: string;
  access: Access;
  params?: P;
  query?: Q;
  body?: B;
  /**
   * A file comes with the body: the part `file` of a multipart message whose part `body` holds the body as JSON. Without a
   * file, where none is required, the body is sent as JSON like any other.
   */
  upload?: { limitBytes: number; isRequired: boolean };
  /** The reply (`savedFile`) is sent as a file to be saved, not as JSON. */
  isDownload?: true;
  reply: R;
};

/** The reply of an endpoint that is a download: text is sent as UTF-8. */
export const savedFile = z.strictObject({
  name: z.string(),
  bytes: z.custom<Uint8Array>((value) => value instanceof Uint8Array),
});

/** Identity; fixes the types of one contract so that server and client share it. */
export function endpoint<P extends Schema, Q extends Schema, B extends Schema, R extends Schema>(
  contract: Endpoint<P, Q, B, R>,
): Endpoint<P, Q, B, R> {
  return contract;
}

type Parsed<S> = S extends Schema ? core.output<S> : undefined;
type Given<S> = S extends Schema ? core.input<S> : undefined;

export type ParamsOf<E> = E extends Endpoint<infer P, Schema, Schema, Schema> ? Parsed<P> : never;
export type QueryOf<E> = E extends Endpoint<Schema, infer Q, Schema, Schema> ? Parsed<Q> : never;
export type BodyOf<E> = E extends Endpoint<Schema, Schema, infer B, Schema> ? Parsed<B> : never;
export type BodyInput<E> = E extends Endpoint<Schema, Schema, infer B, Schema> ? Given<B> : never;
export type ReplyOf<E> = E extends Endpoint<Schema, Schema, Schema, infer R> ? Parsed<R> : never;
