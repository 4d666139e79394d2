import type { Knex } from 'knex';
import { Session } from '#db/models/session.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { withTransaction } from '#server/services/transaction.ts';
import type { RequestContext } from './request-context.ts';
import { endSessionsOf } from './sessions.ts';

/**
 * Ends one of the member's sessions by its public id.
 *
 * @throws NotFoundError for one that is not, and for one that is another member's.
 */
export async function endSession(viewer: MemberViewer, publicId: string, { session, requestId }: RequestContext, knex: Knex): Promise<void> {
  await withTransaction(
    knex,
    async (trx) => {
      await Session.query(trx).delete().where({ memberId: viewer.id, publicId, stage: 'open' }).throwIfNotFound();
      if (publicId === viewer.sessionId) await session.end(trx);
      await auditEnd(viewer, 1, requestId, trx);
    },
    { actorId: viewer.id },
  );
}

/** Ends every session of the member but this one. */
export async function endOtherSessions(viewer: MemberViewer, { requestId }: RequestContext, knex: Knex): Promise<void> {
  await withTransaction(
    knex,
    async (trx) => {
      const ended = await endSessionsOf(viewer.id, trx, { except: viewer.sessionId });
      await auditEnd(viewer, ended, requestId, trx);
    },
    { actorId: viewer.id },
  );
}

async function auditEnd({ id }: MemberViewer, sessions: number, requestId: string, trx: Knex.Transaction): Promise<void> {
  await writeAudit({ act: 'session.ended', actorId: id, subject: { kind: 'member', id }, detail: { sessions }, requestId }, trx);
}
