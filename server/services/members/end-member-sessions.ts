import type { Knex } from 'knex';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { notify } from '#server/services/notices/notify.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { endSessionsOf } from '#server/services/people/sessions.ts';
import { actOnMember } from './act-on-member.ts';
import type { MemberPageOnRecord } from './read-member.ts';

/**
 * Ends every session of a member at once; they can sign in again.
 *
 * @throws ProblemError what `actOnMember` throws.
 */
export async function endMemberSessions(id: string, context: RequestContext, knex: Knex): Promise<MemberPageOnRecord> {
  return actOnMember(
    { deed: 'endSessions', id },
    async ({ registrar }, trx) => {
      const sessions = await endSessionsOf(id, trx);
      const body = 'If you don’t know why, set a new password and tell a registrar.';
      await notify({ memberId: id, kind: 'account', title: 'A registrar ended all your sessions', body, href: '/account' }, trx);
      await writeAudit(
        { act: 'session.ended', actorId: registrar.id, subject: { kind: 'member', id }, detail: { sessions }, requestId: context.requestId },
        trx,
      );
    },
    context,
    knex,
  );
}
