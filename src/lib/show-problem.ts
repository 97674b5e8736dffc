import type { FieldPath, FieldValues, UseFormReturn } from 'react-hook-form';
import { Problem } from '#shared/problem.ts';

/** Whatever was thrown, as a Problem that can be shown. */
export function problemOf(error: unknown): Problem {
  if (error instanceof Problem) return error;
  return new Problem('internal', 'Something on this page failed. Reload it and try again.');
}

/** What went wrong, in a sentence for people. */
export function problemText(error: unknown): string {
  return problemOf(error).message;
}

/** For whoever chose to keep what they had typed, rather than to leave for the sign-in page. */
const signedOutMeanwhile =
  'You have been signed out meanwhile. What you typed is still here: sign in in another window, then send it again.';

/** Puts each fault that the server names on its field, and what belongs to none above the button. */
export function showProblem<Values extends FieldValues, Context, Parsed>(
  form: UseFormReturn<Values, Context, Parsed>,
  error: unknown,
): void {
  const problem = problemOf(error);
  const strays: string[] = [];
  for (const { pointer, detail } of problem.errors) {
    const name = nameOf(pointer);
    if (hasField(form, name)) form.setError(name as FieldPath<Values>, { type: problem.code, message: detail });
    else strays.push(detail);
  }
  const everythingIsPlaced = problem.errors.length > 0 && strays.length === 0;
  if (everythingIsPlaced) return;
  const message = problem.code === 'not-signed-in' ? signedOutMeanwhile : problem.message;
  form.setError('root.problem', { type: problem.code, message: [message, ...strays].join(' ') });
}

/** A JSON pointer (RFC 6901) as the form's dotted name. */
function nameOf(pointer: string): string {
  return pointer
    .split('/')
    .slice(1)
    .map((part) => part.replaceAll('~1', '/').replaceAll('~0', '~'))
    .join('.');
}

function hasField<Values extends FieldValues, Context, Parsed>(
  form: UseFormReturn<Values, Context, Parsed>,
  name: string,
): boolean {
  return name !== '' && form.getValues(name as FieldPath<Values>) !== undefined;
}
