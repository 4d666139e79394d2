import type { Knex } from 'knex';
import { MemberScope } from '#db/models/member-scope.ts';
import { queueMail } from '#server/mail/queue-mail.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { memberByEmail } from './member-by-email.ts';
import { endSessionsOf } from './sessions.ts';

/** What came of it: made, or why not. */
export type MadeRegistrar = 'made' | 'unknown' | 'not-verified' | 'suspended' | 'already';

/**
 * Makes a member a registrar on the word of whoever runs the server: how the first one comes about. Ends their sessions, so that the
 * role begins with a new one.
 */
export async function makeRegistrar(email: string, knex: Knex): Promise<MadeRegistrar> {
  return withTransaction(knex, async (trx) => {
    const member = await memberByEmail(email, trx).forUpdate();
    if (!member?.email) return 'unknown';
    if (member.emailVerifiedAt === null) return 'not-verified';
    if (member.suspendedAt !== null) return 'suspended';
    if (member.role === 'registrar') return 'already';
    const { role } = member;
    await MemberScope.query(trx).delete().where({ memberId: member.id });
    await member.$query(trx).patch({ role: 'registrar', scope: 'none', version: member.version + 1 });
    await endSessionsOf(member.id, trx);
    await queueMail({ to: member.email, template: 'role-changed', data: { role: 'registrar', moderates: null }, memberId: member.id }, trx);
    await writeAudit(
      {
        act: 'role.changed',
        actorId: null,
        subject: { kind: 'member', id: member.id },
        detail: { from: role, to: 'registrar', by: 'command' },
        requestId: null,
      },
      trx,
    );
    return 'made';
  });
}
