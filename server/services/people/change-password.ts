import type { Knex } from 'knex';
import { queueMail } from '#server/mail/queue-mail.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { voidLinksOf } from './link-tokens.ts';
import { refuseWeakPassword } from './password-rules.ts';
import { hashPassword } from './passwords.ts';
import type { RequestContext } from './request-context.ts';
import { lockAccount, requireOwnPassword } from './require-own-password.ts';
import { endSessionsOf } from './sessions.ts';

/**
 * Changes the password. Ends every other session, gives this one a new secret, voids links sent before, and tells the address.
 *
 * @throws ProblemError `not-allowed` at `password`; `invalid` at `newPassword`; `conflict` where the account changed meanwhile.
 */
export async function changePassword(
  viewer: MemberViewer,
  { password, newPassword }: { readonly password: string; readonly newPassword: string },
  context: RequestContext,
  knex: Knex,
): Promise<void> {
  const holder = await requireOwnPassword(viewer, password, context, knex);
  const { displayName, email } = holder;
  refuseWeakPassword(newPassword, { displayName, email, hasSecondFactor: viewer.hasSecondFactor }, 'newPassword');
  const passwordHash = await hashPassword(newPassword);

  await withTransaction(
    knex,
    async (trx) => {
      const member = await lockAccount(holder, trx);
      await member.$query(trx).patch({ passwordHash });
      const ended = await endSessionsOf(viewer.id, trx, { except: viewer.sessionId });
      await context.session.renew(viewer.strength, trx);
      await voidLinksOf(viewer.id, trx);
      await queueMail({ to: email, template: 'password-changed', data: {}, memberId: viewer.id }, trx);
      const subject = { kind: 'member', id: viewer.id };
      await writeAudit(
        { act: 'password.changed', actorId: viewer.id, subject, detail: { otherSessionsEnded: ended }, requestId: context.requestId },
        trx,
      );
    },
    { actorId: viewer.id },
  );
}
