import type { Knex } from 'knex';
import { signedIn } from '#server/policies/viewer.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { takeTurn } from '#server/services/reworks/take-turn.ts';
import { withTransaction } from '#server/services/transaction.ts';

/** What a member does to parts, marks and readings: who it is, in which transaction, and under which request it is written down. */
export type RecordAct = { readonly member: MemberViewer; readonly trx: Knex.Transaction; readonly requestId: string };

/**
 * Does something to the record as one transaction that has its turn between two lots of a rework, so that what follows from it can be worked out
 * within.
 *
 * @throws ProblemError `not-signed-in`, and whatever the work raises.
 */
export async function actOnRecord<Answer>({ viewer, requestId }: RequestContext, knex: Knex, work: (act: RecordAct) => Promise<Answer>): Promise<Answer> {
  const member = signedIn(viewer);
  return withTransaction(
    knex,
    async (trx) => {
      await takeTurn('acts', trx);
      return work({ member, trx, requestId });
    },
    { actorId: member.id },
  );
}
