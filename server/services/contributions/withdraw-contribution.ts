import type { Knex } from 'knex';
import { signedIn } from '#server/policies/viewer.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { requireRevision } from '#server/services/require-revision.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { contributionPage } from './contribution-page.ts';
import type { ContributionPageOnRecord } from './contribution-page.ts';
import { requireNotDecided } from './decided-meanwhile.ts';
import { holdOwnContribution } from './hold-contribution.ts';
import { writeContributionAudit } from './write-contribution-audit.ts';

/**
 * Takes back what was put forward, for good; a new one can be begun from it.
 *
 * @throws ProblemError `not-found`, `not-allowed`; `conflict` where it is not put forward, or a moderator was quicker.
 */
export async function withdrawContribution(
  id: string,
  revision: number,
  { viewer, requestId }: RequestContext,
  knex: Knex,
): Promise<ContributionPageOnRecord> {
  const member = signedIn(viewer);
  return withTransaction(
    knex,
    async (trx) => {
      const contribution = await holdOwnContribution(viewer, id, trx);
      if (contribution.state === 'drafted') throw new ProblemError('conflict', 'It was never put forward. A draft can be thrown away.');
      if (contribution.state !== 'sent-back') await requireNotDecided(contribution, trx);
      requireRevision(contribution, revision);
      await contribution.$query(trx).patch({ state: 'withdrawn', changedAt: trx.raw('clock_timestamp()'), decidedAt: null, decidedById: null });
      await writeContributionAudit('contribution.withdrawn', contribution, { actorId: member.id, requestId }, trx);
      return contributionPage(viewer, id, trx);
    },
    { actorId: member.id },
  );
}
