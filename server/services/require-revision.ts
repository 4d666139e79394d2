import { ProblemError } from './problem-error.ts';

/** @throws ProblemError `conflict` where it was changed since that revision. */
export function requireRevision(held: { readonly revision: number }, revision: number): void {
  if (held.revision !== revision) {
    throw new ProblemError('conflict', 'It was changed elsewhere meanwhile. Look at it again first; what you typed is still with you.');
  }
}
