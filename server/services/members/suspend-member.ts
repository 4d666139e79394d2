import type { Knex } from 'knex';
import { queueMail } from '#server/mail/queue-mail.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { notify } from '#server/services/notices/notify.ts';
import { voidLinksOf } from '#server/services/people/link-tokens.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { endSessionsOf } from '#server/services/people/sessions.ts';
import { actOnMember } from './act-on-member.ts';
import type { MemberPageOnRecord } from './read-member.ts';

export type Reasoned = { readonly reason: string; readonly version: number };

/**
 * Suspends a member. Their sessions end at once and links sent to them are void; a letter tells them why.
 *
 * @throws ProblemError what `actOnMember` throws.
 */
export async function suspendMember(id: string, { reason, version }: Reasoned, context: RequestContext, knex: Knex): Promise<MemberPageOnRecord> {
  return actOnMember(
    { deed: 'suspend', id, version },
    async ({ member, registrar }, trx) => {
      await member.$query(trx).patch({
        suspendedAt: trx.raw('now()'),
        suspensionReason: reason,
        suspendedById: registrar.id,
        version: member.version + 1,
      });
      await endSessionsOf(id, trx);
      await voidLinksOf(id, trx);
      // An address that was never confirmed may be somebody else's.
      if (member.email !== null && member.emailVerifiedAt !== null) {
        await queueMail({ to: member.email, template: 'suspended', data: { reason }, memberId: id }, trx);
      }
      await notify({ memberId: id, kind: 'account', title: 'Your account was suspended', body: reason, href: '/account' }, trx);
      await writeAudit(
        { act: 'member.suspended', actorId: registrar.id, subject: { kind: 'member', id }, detail: { reason }, requestId: context.requestId },
        trx,
      );
    },
    context,
    knex,
  );
}
