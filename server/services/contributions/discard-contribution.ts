import type { Knex } from 'knex';
import { signedIn } from '#server/policies/viewer.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { holdOwnContribution } from './hold-contribution.ts';
import { writeContributionAudit } from './write-contribution-audit.ts';

/**
 * Throws a draft away. What was ever put forward is kept.
 *
 * @throws ProblemError `not-found`, `not-allowed`; `conflict` for one that was put forward.
 */
export async function discardContribution(id: string, { viewer, requestId }: RequestContext, knex: Knex): Promise<void> {
  const member = signedIn(viewer);
  await withTransaction(
    knex,
    async (trx) => {
      const contribution = await holdOwnContribution(viewer, id, trx);
      if (contribution.state !== 'drafted') throw new ProblemError('conflict', 'It was put forward, so it is kept. You can withdraw it.');
      await contribution.$query(trx).delete();
      await writeContributionAudit('contribution.discarded', contribution, { actorId: member.id, requestId }, trx);
    },
    { actorId: member.id },
  );
}
