import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import { ContributionComment } from '#db/models/contribution-comment.ts';
import { contributionRights } from '#server/policies/contributions.ts';
import { signedIn } from '#server/policies/viewer.ts';
import { notify } from '#server/services/notices/notify.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { contributionPage } from './contribution-page.ts';
import type { ContributionPageOnRecord } from './contribution-page.ts';
import { asLabel } from '#server/services/facts/as-label.ts';
import { holdContribution } from './hold-contribution.ts';
import { writeContributionAudit } from './write-contribution-audit.ts';

type NewComment = { readonly path: string | null; readonly text: string };

/**
 * Says something about a contribution, or one field of it, as its author or a moderator; the other is told.
 *
 * @throws ProblemError `not-signed-in`, `not-found`, `not-allowed`, `second-factor-owed`; `conflict` for a draft and what was withdrawn.
 */
export async function commentOnContribution(
  id: string,
  { path, text }: NewComment,
  { viewer, requestId }: RequestContext,
  knex: Knex,
): Promise<ContributionPageOnRecord> {
  const member = signedIn(viewer);
  return withTransaction(
    knex,
    async (trx) => {
      const contribution = await holdContribution(viewer, id, trx);
      const { state, authorId } = contribution;
      if (authorId === member.id && (state === 'drafted' || state === 'withdrawn')) throw new ProblemError('conflict', 'Nobody else sees it.');
      if (!contributionRights(viewer, contribution).comment) throw new ProblemError('not-allowed', 'Its author and whoever decides about it comment on it.');
      await ContributionComment.query(trx).insert({ id: uuidV7(), contributionId: id, authorId: member.id, path: path === '' ? null : path, text });
      await writeContributionAudit('contribution.commented', contribution, { actorId: member.id, requestId }, trx);
      for (const memberId of await othersIn(id, authorId, member.id, trx)) {
        const title = asLabel(`A comment on “${contribution.title}”`);
        await notify({ memberId, kind: 'contribution', title, body: text, href: `/contributions/${id}` }, trx);
      }
      return contributionPage(viewer, id, trx);
    },
    { actorId: member.id },
  );
}

/** The author, and everybody who commented before. */
async function othersIn(contributionId: string, authorId: string, withoutId: string, trx: Knex.Transaction): Promise<readonly string[]> {
  const comments = await ContributionComment.query(trx).where({ contributionId });
  return [...new Set([authorId, ...comments.map((comment) => comment.authorId)])].filter((id) => id !== withoutId);
}
