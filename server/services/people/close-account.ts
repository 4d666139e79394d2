import type { Knex } from 'knex';
import { Authenticator } from '#db/models/authenticator.ts';
import { Contribution } from '#db/models/contribution.ts';
import { MemberScope } from '#db/models/member-scope.ts';
import { Passkey } from '#db/models/passkey.ts';
import { RecoveryCode } from '#db/models/recovery-code.ts';
import { WebauthnChallenge } from '#db/models/webauthn-challenge.ts';
import { FORMER_MEMBER } from '#db/vocabulary.ts';
import { eraseMailOf } from '#server/mail/erase-mail-of.ts';
import { queueMail } from '#server/mail/queue-mail.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { eraseNoticesOf } from '#server/services/notices/erase-notices-of.ts';
import { letGoOfParts } from '#server/services/parts/let-go-of-parts.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { accountKey, forgiveAttempts } from './attempts.ts';
import { voidLinksOf } from './link-tokens.ts';
import { isLastRegistrar } from './registrars.ts';
import type { RequestContext } from './request-context.ts';
import { lockAccount, requireOwnPassword } from './require-own-password.ts';
import { endSessionsOf } from './sessions.ts';

/**
 * Closes an account. What the member entered or put forward stays, under "a former member", and so do public parts and what others have read;
 * name, address, password, second factors, sessions, drafts, private parts, notices and scopes go. The trail keeps the id, which leads to nobody any more.
 *
 * @throws ProblemError `not-allowed` at `password`; `conflict` for the last registrar.
 */
export async function closeAccount(viewer: MemberViewer, password: string, context: RequestContext, knex: Knex): Promise<void> {
  const holder = await requireOwnPassword(viewer, password, context, knex);
  await withTransaction(
    knex,
    async (trx) => {
      if (await isLastRegistrar(viewer.id, trx)) {
        throw new ProblemError('conflict', 'You are the last registrar. Make somebody else one first.');
      }
      const member = await lockAccount(holder, trx);
      await context.session.end(trx);
      await endSessionsOf(viewer.id, trx);
      await voidLinksOf(viewer.id, trx);
      await Authenticator.query(trx).delete().where({ memberId: viewer.id });
      await Passkey.query(trx).delete().where({ memberId: viewer.id });
      await RecoveryCode.query(trx).delete().where({ memberId: viewer.id });
      await WebauthnChallenge.query(trx).delete().where({ memberId: viewer.id });
      await MemberScope.query(trx).delete().where({ memberId: viewer.id });
      // What was put forward is the register's to decide; what was not is nobody's any more.
      await Contribution.query(trx).delete().where({ authorId: viewer.id, state: 'drafted' });
      await letGoOfParts(viewer.id, trx);
      await eraseNoticesOf(viewer.id, trx);
      await eraseMailOf(viewer.id, trx);
      for (const kind of ['password', 'second-factor', 'letter'] as const) await forgiveAttempts(kind, accountKey(holder.email), trx);
      await member.$query(trx).patch({
        displayName: FORMER_MEMBER,
        email: null,
        emailVerifiedAt: null,
        passwordHash: null,
        role: 'member',
        scope: 'none',
        demo: false,
        closedAt: trx.raw('now()'),
        version: member.version + 1,
      });
      // Not as the member's own: those were just forgotten, and this one is forgotten when it is sent.
      await queueMail({ to: holder.email, template: 'account-closed', data: {} }, trx);
      const subject = { kind: 'member', id: viewer.id };
      await writeAudit({ act: 'account.closed', actorId: viewer.id, subject, requestId: context.requestId }, trx);
    },
    { actorId: viewer.id },
  );
}
