import { ProblemError } from './problem-error.ts';

/** A value that its schema takes and the register does not, at its path in what was sent. */
export function wrongValue(path: readonly (string | number)[], message: string): ProblemError {
  return new ProblemError('invalid', 'See which, and why, under errors.', { errors: [{ path: [...path], message }] });
}
