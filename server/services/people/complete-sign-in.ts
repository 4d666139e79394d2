import type { Knex } from 'knex';
import type { Member } from '#db/models/member.ts';
import type { SignInStrength } from '#db/vocabulary.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { accountKey, forgiveAttempts } from './attempts.ts';
import { readMe } from './read-me.ts';
import type { MeOnRecord } from './read-me.ts';
import type { RequestContext } from './request-context.ts';

/**
 * Signs a member in, all they owed being given: a session under a new secret, the failed attempts forgotten, the act written down. What
 * remains of the way there, a session that owed a second factor, ends.
 */
export async function completeSignIn(
  member: Pick<Member, 'id' | 'email'>,
  strength: SignInStrength,
  { session, requestId }: RequestContext,
  trx: Knex.Transaction,
): Promise<MeOnRecord> {
  await session.start({ memberId: member.id, stage: 'open', strength }, trx);
  if (member.email !== null) {
    await forgiveAttempts('password', accountKey(member.email), trx);
    if (strength === 'second-factor') await forgiveAttempts('second-factor', accountKey(member.email), trx);
  }
  await writeAudit(
    { act: 'session.started', actorId: member.id, subject: { kind: 'member', id: member.id }, detail: { strength }, requestId },
    trx,
  );
  return readMe(member.id, strength, trx);
}
