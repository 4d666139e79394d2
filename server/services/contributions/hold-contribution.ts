import type { Knex } from 'knex';
import { Contribution } from '#db/models/contribution.ts';
import { requireMayReadContribution } from '#server/policies/contributions.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { ProblemError } from '#server/services/problem-error.ts';

/**
 * The row of a contribution the viewer may know of, theirs to change until the transaction ends.
 *
 * @throws ProblemError `not-found`, `second-factor-owed`.
 */
export async function holdContribution(viewer: Viewer, id: string, trx: Knex.Transaction): Promise<Contribution> {
  const contribution = await Contribution.query(trx).findById(id).forUpdate();
  if (!contribution) throw new ProblemError('not-found', 'No contribution of this id is for you to see.');
  requireMayReadContribution(viewer, contribution);
  return contribution;
}

/**
 * The same for its author.
 *
 * @throws ProblemError `not-found`; `not-allowed` for whoever may read it and did not write it; `second-factor-owed`.
 */
export async function holdOwnContribution(viewer: Viewer, id: string, trx: Knex.Transaction): Promise<Contribution> {
  const contribution = await holdContribution(viewer, id, trx);
  if (viewer.kind !== 'member' || contribution.authorId !== viewer.id) throw new ProblemError('not-allowed', 'Only its author does that.');
  return contribution;
}
