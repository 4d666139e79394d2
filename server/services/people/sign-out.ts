import type { Knex } from 'knex';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { withTransaction } from '#server/services/transaction.ts';
import type { RequestContext } from './request-context.ts';

/** Ends the session a request came with, complete or not. Somebody who is signed out already stays so. */
export async function signOut({ viewer, session, requestId }: RequestContext, knex: Knex): Promise<void> {
  await withTransaction(knex, async (trx) => {
    await session.end(trx);
    if (viewer.kind === 'member') {
      const subject = { kind: 'member', id: viewer.id };
      await writeAudit({ act: 'session.ended', actorId: viewer.id, subject, detail: { sessions: 1 }, requestId }, trx);
    }
  });
}
