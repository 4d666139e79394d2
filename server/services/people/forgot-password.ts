import type { Knex } from 'knex';
import { queueMail } from '#server/mail/queue-mail.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { accountKey, claimAttempt } from './attempts.ts';
import { issueLink } from './link-tokens.ts';
import { memberByEmail } from './member-by-email.ts';
import type { RequestContext } from './request-context.ts';

/**
 * Sends a link to set a new password to an address or, where no account has it, word of that; whoever asks sees no difference, in
 * words or in work.
 *
 * @throws ProblemError `too-many-requests`.
 */
export async function forgotPassword(email: string, { network, requestId }: RequestContext, knex: Knex): Promise<void> {
  await claimAttempt({ kind: 'letter', account: accountKey(email), network }, knex);
  await withTransaction(knex, async (trx) => {
    const member = await memberByEmail(email, trx);
    const token = await issueLink({ memberId: member?.id ?? null, purpose: 'reset' }, trx);
    await (member?.email
      ? queueMail({ to: member.email, template: 'set-new-password', data: { token }, memberId: member.id }, trx)
      : queueMail({ to: email, template: 'no-account', data: {} }, trx));
    const subject = member ? { kind: 'member', id: member.id } : null;
    await writeAudit({ act: 'password.reset-asked', actorId: null, subject, requestId }, trx);
  });
}
