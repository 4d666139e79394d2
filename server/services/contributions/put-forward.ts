import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import { ContributionEvidence } from '#db/models/contribution-evidence.ts';
import { Contribution } from '#db/models/contribution.ts';
import { signedIn } from '#server/policies/viewer.ts';
import { kindModule } from '#server/services/kinds/all-kinds.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { checkProposal } from './check-proposal.ts';
import { contributionPage } from './contribution-page.ts';
import type { ContributionPageOnRecord } from './contribution-page.ts';
import { asLabel } from '#server/services/facts/as-label.ts';
import { requireRevision } from '#server/services/require-revision.ts';
import { holdOwnContribution } from './hold-contribution.ts';
import { requireDraft } from './save-contribution.ts';
import { scopeOf } from './scope-of.ts';
import { writeContributionAudit } from './write-contribution-audit.ts';

/**
 * Puts a draft forward, or one that was sent back, with the evidence there is today. Gathering it can take seconds, so that is done
 * before the row is held; what was gathered is of the revision that is put forward.
 *
 * @throws ProblemError `not-found`, `not-allowed`; `conflict` where it was changed elsewhere or is no draft; `invalid` with every fault.
 */
export async function putForward(id: string, revision: number, { viewer, requestId }: RequestContext, knex: Knex): Promise<ContributionPageOnRecord> {
  const member = signedIn(viewer);
  const draft = await withTransaction(knex, async (trx) => {
    const contribution = await holdOwnContribution(viewer, id, trx);
    requireDraft(contribution);
    requireRevision(contribution, revision);
    return contribution;
  });
  const { kind, subjectId, authorId } = draft;
  const checked = await checkProposal({ kind, subjectId, authorId, payload: draft.payload, citations: draft.citations }, knex);
  if (!checked.ok) throw new ProblemError('invalid', 'See which, and why, under errors.', { errors: checked.fault });
  const { payload } = checked.value;
  const findings = await kindModule(kind).gather({ factId: subjectId, payload }, knex);

  return withTransaction(
    knex,
    async (trx) => {
      const contribution = await holdOwnContribution(viewer, id, trx);
      requireDraft(contribution);
      requireRevision(contribution, revision);
      // Nothing decided stands any more, and what it says is from now on as its form has it.
      const put = await Contribution.query(trx).patchAndFetchById(id, {
        state: 'put-forward',
        payload: { ...payload },
        citations: checked.value.citations,
        title: asLabel(await kindModule(kind).titleOf(payload, trx)),
        makerId: await scopeOf(kind, subjectId, payload, trx),
        revision: contribution.revision + 1,
        changedAt: trx.raw('clock_timestamp()'),
        putForwardAt: trx.raw('clock_timestamp()'),
        decidedAt: null,
        decidedById: null,
      });
      await ContributionEvidence.query(trx).insert({
        id: uuidV7(),
        contributionId: id,
        revision: put.revision,
        occasion: 'put-forward',
        findings,
      });
      await writeContributionAudit('contribution.put-forward', put, { actorId: member.id, requestId }, trx);
      return contributionPage(viewer, id, trx, []);
    },
    { actorId: member.id },
  );
}
