import { ProblemError } from '#server/services/problem-error.ts';
import type { MemberViewer } from './viewer.ts';

/**
 * A sensitive act needs a proof of who is asking that is no older than ten minutes.
 *
 * @throws ProblemError `identity-not-confirmed`.
 */
export function requireRecentProof(viewer: MemberViewer): void {
  if (!viewer.confirmedRecently) {
    throw new ProblemError('identity-not-confirmed', 'It is more than ten minutes since you last proved who you are.');
  }
}
