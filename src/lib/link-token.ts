import { Problem } from '#shared/problem.ts';

/** What a link of a mail or of the terminal carries behind its #, where no server is sent it. */
export function tokenInAddress(): string {
  const token = window.location.hash.slice(1);
  if (token.length >= 20 && token.length <= 100) return token;
  throw new Problem('not-found', 'This link is not complete. Open it again from where you got it, or copy all of it.');
}
