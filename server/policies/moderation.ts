import { ProblemError } from '#server/services/problem-error.ts';
import { requireSecondFactor } from './staff.ts';
import { signedIn } from './viewer.ts';
import type { Viewer } from './viewer.ts';

/** Whose queue somebody reads. */
export type QueueReader = { readonly id: string; readonly makerIds: readonly string[] | 'all' };

/**
 * A moderator, who reads what waits for the makers in scope, or a registrar, who reads it all and decides none of it.
 *
 * @throws ProblemError `not-signed-in`; `not-found` for everybody else; `second-factor-owed`.
 */
export function requireQueueReader(viewer: Viewer): QueueReader {
  const member = signedIn(viewer);
  if (member.role === 'member') throw new ProblemError('not-found', 'There is nothing at this address.');
  requireSecondFactor(member);
  return { id: member.id, makerIds: member.role === 'registrar' ? 'all' : member.moderates };
}
