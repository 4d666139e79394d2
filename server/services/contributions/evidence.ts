import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import { ContributionEvidence } from '#db/models/contribution-evidence.ts';
import { Contribution } from '#db/models/contribution.ts';
import { contributionRights, requireMayReadContribution, requireModerator } from '#server/policies/contributions.ts';
import { signedIn } from '#server/policies/viewer.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { kindModule } from '#server/services/kinds/all-kinds.ts';
import { parsePayload } from '#server/services/kinds/parse-payload.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { keptEvidence } from './kept-evidence.ts';
import type { KeptEvidence } from './kept-evidence.ts';

/**
 * The evidence kept with a contribution, the newest first.
 *
 * @throws ProblemError `not-found`, `second-factor-owed`; `not-allowed` for a draft.
 */
export async function readEvidence(viewer: Viewer, id: string, knex: Knex): Promise<readonly KeptEvidence[]> {
  const contribution = await readable(viewer, id, knex);
  if (!contributionRights(viewer, contribution).seeEvidence) throw new ProblemError('not-allowed', 'There is no evidence before it is put forward.');
  return keptEvidence(id, knex);
}

/**
 * Works the evidence out again on today's record, as a moderator who opens it does, and keeps it with the rest.
 *
 * @throws ProblemError `not-signed-in`, `not-found`, `not-allowed`, `second-factor-owed`; `conflict` once it is decided.
 */
export async function gatherEvidence(id: string, { viewer }: RequestContext, knex: Knex): Promise<readonly KeptEvidence[]> {
  signedIn(viewer);
  const contribution = await readable(viewer, id, knex);
  requireModerator(viewer, contribution.makerId);
  const { kind, subjectId, state, revision } = contribution;
  if (state !== 'put-forward') throw new ProblemError('conflict', 'It waits for no decision.');
  const said = parsePayload(kind, contribution.payload);
  if (!said.ok) throw new ProblemError('conflict', 'What it says is no longer taken. Send it back.', { errors: said.fault });
  const findings = await kindModule(kind).gather({ factId: subjectId, payload: said.value }, knex);
  await ContributionEvidence.query(knex).insert({ id: uuidV7(), contributionId: id, revision, occasion: 'opened', findings });
  return keptEvidence(id, knex);
}

async function readable(viewer: Viewer, id: string, knex: Knex): Promise<Contribution> {
  const contribution = await Contribution.query(knex).findById(id);
  if (!contribution) throw new ProblemError('not-found', 'No contribution of this id is for you to see.');
  requireMayReadContribution(viewer, contribution);
  return contribution;
}
