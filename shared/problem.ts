import * as z from 'zod/mini';

/** Everything that can be refused, with the HTTP status it answers and a title for people. */
export const problems = {
  'invalid-input': { status: 400, title: 'Some of this needs another look' },
  'not-signed-in': { status: 401, title: 'Please sign in' },
  'wrong-credentials': { status: 401, title: 'E-mail and password do not match' },
  'not-allowed': { status: 403, title: 'This is not open to you' },
  'not-found': { status: 404, title: 'There is nothing here' },
  'wrong-phase': { status: 409, title: 'Not at this point' },
  'stale-view': { status: 409, title: 'The session has moved on' },
  'wrong-label': { status: 409, title: 'That is another cable' },
  'already-taken': { status: 409, title: 'That is already in use' },
  'too-early': { status: 409, title: 'Not yet' },
  'too-late': { status: 409, title: 'Too late' },
  'too-large': { status: 413, title: 'That is too large' },
  'too-many-requests': { status: 429, title: 'Too many attempts' },
  internal: { status: 500, title: 'Fairlead failed' },
  unavailable: { status: 503, title: 'Fairlead cannot answer right now' },
  unreachable: { status: 0, title: 'Fairlead cannot be reached' },
} as const satisfies Record<string, { status: number; title: string }>;

export type ProblemCode = keyof typeof problems;

/** One fault in the input: where it is (a JSON pointer, RFC 6901) and what is wrong with it. */
export type InputFault = { pointer: string; detail: string };

/** A problem as it travels (RFC 9457, `application/problem+json`; socket acknowledgements carry the same object). */
export const problemBody = z.object({
  type: z.string(),
  title: z.string(),
  status: z.number(),
  detail: z.string(),
  instance: z.optional(z.string()),
  errors: z.optional(z.array(z.object({ pointer: z.string(), detail: z.string() }))),
});
export type ProblemBody = z.output<typeof problemBody>;

const typePrefix = 'urn:fairlead:problem:';

/** The one error type. Anything refused anywhere is a Problem; anything else is a fault of the program. */
export class Problem extends Error {
  override readonly name = 'Problem';
  readonly code: ProblemCode;
  readonly errors: readonly InputFault[];
  instance: string | undefined;

  constructor(code: ProblemCode, detail: string, errors: readonly InputFault[] = []) {
    super(detail);
    this.code = code;
    this.errors = errors;
  }

  get status(): number {
    return problems[this.code].status;
  }

  get title(): string {
    return problems[this.code].title;
  }

  toBody(instance?: string): ProblemBody {
    const body: ProblemBody = {
      type: typePrefix + this.code,
      title: this.title,
      status: this.status,
      detail: this.message,
    };
    if (instance !== undefined) body.instance = instance;
    if (this.errors.length > 0) body.errors = [...this.errors];
    return body;
  }

  /** Reads a problem back from the wire; a body that is none becomes `internal`. */
  static fromBody(value: unknown): Problem {
    const parsed = problemBody.safeParse(value);
    if (!parsed.success) return new Problem('internal', 'The answer could not be read. Please try again.');
    const code = parsed.data.type.startsWith(typePrefix) ? parsed.data.type.slice(typePrefix.length) : 'internal';
    const known = Object.hasOwn(problems, code) ? (code as ProblemCode) : 'internal';
    const problem = new Problem(known, parsed.data.detail, parsed.data.errors ?? []);
    problem.instance = parsed.data.instance;
    return problem;
  }
}
