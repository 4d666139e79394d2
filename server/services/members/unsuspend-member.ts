import type { Knex } from 'knex';
import { queueMail } from '#server/mail/queue-mail.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { notify } from '#server/services/notices/notify.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { actOnMember } from './act-on-member.ts';
import type { MemberPageOnRecord } from './read-member.ts';
import type { Reasoned } from './suspend-member.ts';

/**
 * Lifts a suspension; the member can sign in again, and is told so.
 *
 * @throws ProblemError what `actOnMember` throws.
 */
export async function unsuspendMember(id: string, { reason, version }: Reasoned, context: RequestContext, knex: Knex): Promise<MemberPageOnRecord> {
  return actOnMember(
    { deed: 'unsuspend', id, version },
    async ({ member, registrar }, trx) => {
      await member.$query(trx).patch({ suspendedAt: null, suspensionReason: null, suspendedById: null, version: member.version + 1 });
      if (member.email !== null && member.emailVerifiedAt !== null) {
        await queueMail({ to: member.email, template: 'unsuspended', data: {}, memberId: id }, trx);
      }
      await notify({ memberId: id, kind: 'account', title: 'Your account is open again', body: reason, href: '/account' }, trx);
      await writeAudit(
        { act: 'member.unsuspended', actorId: registrar.id, subject: { kind: 'member', id }, detail: { reason }, requestId: context.requestId },
        trx,
      );
    },
    context,
    knex,
  );
}
