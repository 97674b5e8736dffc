import type { ErrorRequestHandler, RequestHandler } from 'express';
import type { Logger } from 'pino';
import { Problem } from '#shared/problem.ts';

type ParserFailure = { type: string; status: number };

function isParserFailure(error: unknown): error is ParserFailure {
  return typeof error === 'object' && error !== null && 'type' in error && 'status' in error;
}

/** Anything thrown, as a Problem; what is nobody's fault outside is `internal` and goes to the log with its cause. */
export function problemFrom(error: unknown, log: Logger): Problem {
  if (error instanceof Problem) return error;
  if (isParserFailure(error) && error.status >= 400 && error.status < 500) {
    if (error.type === 'entity.too.large') return new Problem('too-large', 'Send at most 256 kB at once.');
    return new Problem('invalid-input', 'This could not be read. Send JSON.', [
      { pointer: '', detail: 'Not readable as JSON' },
    ]);
  }
  if (error instanceof URIError) return new Problem('not-found', 'There is nothing at this address.');
  log.error({ err: error }, 'a request failed');
  return new Problem('internal', 'Something went wrong on our side. Nothing you typed is lost; please try again.');
}

/** The one place that writes an error (RFC 9457). */
export function problemHandler(log: Logger): ErrorRequestHandler {
  return (error, request, response, next) => {
    if (response.headersSent) return next(error);
    const problem = problemFrom(error, log);
    const { id } = request as { id?: unknown };
    const instance = typeof id === 'string' ? `urn:uuid:${id}` : undefined;
    response.status(problem.status).type('application/problem+json').json(problem.toBody(instance));
  };
}

export const nothingHere: RequestHandler = () => {
  throw new Problem('not-found', 'There is nothing at this address.');
};
