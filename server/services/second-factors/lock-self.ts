import type { Knex } from 'knex';
import { Member } from '#db/models/member.ts';
import { Session } from '#db/models/session.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';
import { ProblemError } from '#server/services/problem-error.ts';

/**
 * The row of the member who asks, held until the transaction ends. Signing in holds it too, so nobody gets past a second factor that is
 * being added.
 *
 * @throws ProblemError `not-signed-in` where the account or the session ended after the request came in.
 */
export async function lockSelf(viewer: MemberViewer, trx: Knex.Transaction): Promise<Member> {
  const member = await Member.query(trx).findById(viewer.id).whereNull('suspendedAt').whereNull('closedAt').forUpdate();
  const session = await Session.query(trx).findOne({ publicId: viewer.sessionId, memberId: viewer.id, stage: 'open' });
  if (!member || !session) throw new ProblemError('not-signed-in', 'Your session ended just now. Sign in, then try again.');
  return member;
}
