import type { Knex } from 'knex';
import { ContributionOpening } from '#db/models/contribution-opening.ts';
import { Contribution } from '#db/models/contribution.ts';
import type { Member } from '#db/models/member.ts';
import { requireMayReadContribution, requireModerator } from '#server/policies/contributions.ts';
import { signedIn } from '#server/policies/viewer.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { whoHasOpen } from './who-has-it-open.ts';

/**
 * Takes note that a moderator has a contribution open, and answers who else has.
 *
 * @throws ProblemError `not-signed-in`, `not-found`, `not-allowed`, `second-factor-owed`.
 */
export async function openContribution(id: string, { viewer }: RequestContext, knex: Knex): Promise<readonly Member[]> {
  const { id: memberId } = signedIn(viewer);
  const contribution = await Contribution.query(knex).findById(id);
  if (!contribution) throw new ProblemError('not-found', 'No contribution of this id is for you to see.');
  requireMayReadContribution(viewer, contribution);
  requireModerator(viewer, contribution.makerId);
  await ContributionOpening.query(knex)
    .insert({ contributionId: id, memberId, seenAt: knex.raw('clock_timestamp()') })
    .onConflict(['contributionId', 'memberId'])
    .merge();
  return (await whoHasOpen([id], memberId, knex)).get(id) ?? [];
}
