import type { Knex } from 'knex';
import { queueMail } from '#server/mail/queue-mail.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { accountKey, claimAttempt } from './attempts.ts';
import { issueLink } from './link-tokens.ts';
import { memberByEmail } from './member-by-email.ts';
import type { RequestContext } from './request-context.ts';
import { lockAccount, requireOwnPassword } from './require-own-password.ts';

/**
 * Asks for another address: a link goes to the new one, and the old one is told. Where the new one is another member's, they get word
 * instead of a link, and whoever asked sees no difference.
 *
 * @throws ProblemError `not-allowed` at `password`; `invalid` at `email`; `too-many-requests`.
 */
export async function changeEmail(
  viewer: MemberViewer,
  { password, email }: { readonly password: string; readonly email: string },
  context: RequestContext,
  knex: Knex,
): Promise<void> {
  const holder = await requireOwnPassword(viewer, password, context, knex);
  if (holder.email === email) {
    throw new ProblemError('invalid', 'See which, and why, under errors.', { errors: [{ path: ['email'], message: 'That is your address already' }] });
  }
  await claimAttempt({ kind: 'letter', account: accountKey(email), network: context.network }, knex);

  await withTransaction(
    knex,
    async (trx) => {
      await lockAccount(holder, trx);
      const other = await memberByEmail(email, trx).whereNot({ id: viewer.id });
      const token = await issueLink({ memberId: other ? null : viewer.id, purpose: 'change-email', email }, trx);
      await (other
        ? queueMail({ to: email, template: 'already-known', data: {}, memberId: other.id }, trx)
        : queueMail({ to: email, template: 'confirm-new-address', data: { token }, memberId: viewer.id }, trx));
      await queueMail({ to: holder.email, template: 'address-changing', data: { newAddress: email }, memberId: viewer.id }, trx);
      const subject = { kind: 'member', id: viewer.id };
      await writeAudit({ act: 'email.change-asked', actorId: viewer.id, subject, requestId: context.requestId }, trx);
    },
    { actorId: viewer.id },
  );
}
