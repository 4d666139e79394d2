import type { Knex } from 'knex';
import { Member } from '#db/models/member.ts';
import { queueMail } from '#server/mail/queue-mail.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { hasSecondFactor, readSecondFactors } from '#server/services/second-factors/read-second-factors.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { accountKey, forgiveAttempts } from './attempts.ts';
import { findLink, takeLink, voidLinksOf } from './link-tokens.ts';
import { refuseWeakPassword } from './password-rules.ts';
import { hashPassword } from './passwords.ts';
import type { RequestContext } from './request-context.ts';
import { endSessionsOf } from './sessions.ts';

/**
 * Sets a new password with a link. Ends every session and signs nobody in. The link came to the account's address, so it confirms that
 * as well; and it makes up for wrong passwords somebody else tried. A password that is refused leaves the link as it was.
 *
 * @throws ProblemError `invalid` at `token` or `password`.
 */
export async function resetPassword(
  { token, password }: { readonly token: string; readonly password: string },
  { requestId }: RequestContext,
  knex: Knex,
): Promise<void> {
  const { memberId } = await findLink(token, ['reset'], knex);
  const owner = await Member.query(knex).findById(memberId).throwIfNotFound();
  const owned = await readSecondFactors(memberId, knex);
  const email = owner.email ?? '';
  refuseWeakPassword(password, { displayName: owner.displayName, email, hasSecondFactor: hasSecondFactor(owned) }, 'password');
  const passwordHash = await hashPassword(password);

  await withTransaction(knex, async (trx) => {
    await takeLink(token, ['reset'], trx);
    const member = await Member.query(trx).findById(memberId).forUpdate().throwIfNotFound();
    await member.$query(trx).patch({ passwordHash, ...(member.emailVerifiedAt === null ? { emailVerifiedAt: trx.raw('now()') } : {}) });
    await endSessionsOf(memberId, trx);
    await voidLinksOf(memberId, trx);
    if (member.email !== null) {
      await forgiveAttempts('password', accountKey(member.email), trx);
      await queueMail({ to: member.email, template: 'password-changed', data: {}, memberId }, trx);
    }
    await writeAudit({ act: 'password.reset', actorId: memberId, subject: { kind: 'member', id: memberId }, requestId }, trx);
  });
}
