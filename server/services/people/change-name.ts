import type { Knex } from 'knex';
import { Member } from '#db/models/member.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { readMe } from './read-me.ts';
import type { MeOnRecord } from './read-me.ts';
import type { RequestContext } from './request-context.ts';

/** Changes the name shown beside what a member entered. The trail says that, not what the names were. */
export async function changeName(viewer: MemberViewer, displayName: string, { requestId }: RequestContext, knex: Knex): Promise<MeOnRecord> {
  return withTransaction(
    knex,
    async (trx) => {
      await Member.query(trx).findById(viewer.id).whereNull('closedAt').patch({ displayName });
      await writeAudit({ act: 'account.renamed', actorId: viewer.id, subject: { kind: 'member', id: viewer.id }, requestId }, trx);
      return readMe(viewer.id, viewer.strength, trx);
    },
    { actorId: viewer.id },
  );
}
