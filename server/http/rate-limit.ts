import type { Request, RequestHandler } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';
import { Problem } from '#shared/problem.ts';

export type Limit = {
  /** Attempts within the window, and the window in milliseconds. */
  readonly attempts: number;
  readonly windowMs: number;
  /** Whom an attempt is counted for; by default the sender's address. */
  readonly by?: (request: Request) => string;
  /** Count only attempts that fail. */
  readonly failuresOnly?: boolean;
};

/** Refuses with `too-many-requests` beyond a number of attempts, saying when to try again. */
export function limit({ attempts, windowMs, by, failuresOnly = false }: Limit): RequestHandler {
  return rateLimit({
    windowMs,
    limit: attempts,
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    skipSuccessfulRequests: failuresOnly,
    keyGenerator: (request) => by?.(request) ?? ipKeyGenerator(request.ip ?? ''),
    handler: (request, _response, next) => {
      const resetAt =
        (request as { rateLimit?: { resetTime?: Date } }).rateLimit?.resetTime?.getTime() ?? Date.now() + windowMs;
      const minutes = Math.max(1, Math.ceil((resetAt - Date.now()) / 60_000));
      next(
        new Problem(
          'too-many-requests',
          `Too many attempts. Try again in ${minutes} minute${minutes === 1 ? '' : 's'}.`,
        ),
      );
    },
  });
}

export const addressOf = (request: Request) => ipKeyGenerator(request.ip ?? '');

/** The e-mail address in a body that nobody has checked yet; empty when there is none. */
export const emailOf = (body: unknown) =>
  typeof body === 'object' && body !== null && 'email' in body ? String(body.email).toLowerCase().slice(0, 200) : '';
