import { ProblemError } from '#server/services/problem-error.ts';
import { requireSecondFactor } from './staff.ts';
import { signedIn } from './viewer.ts';
import type { Viewer } from './viewer.ts';

/**
 * What is being worked out again is for moderators, of any maker, and registrars to see.
 *
 * @throws ProblemError `not-signed-in`; `not-found` for other members; `second-factor-owed`.
 */
export function requireMaySeeReworks(viewer: Viewer): void {
  const member = signedIn(viewer);
  if (member.role === 'member') throw new ProblemError('not-found', 'There is nothing at this address.');
  requireSecondFactor(member);
}
