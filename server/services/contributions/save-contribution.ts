import type { Knex } from 'knex';
import type { saveContribution as saveEndpoint } from '#contract/contributions.ts';
import type { HandlerInput } from '#contract/endpoint.ts';
import type { Contribution } from '#db/models/contribution.ts';
import { signedIn } from '#server/policies/viewer.ts';
import { versionsOf } from '#server/services/facts/fact-versions.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { requireRevision } from '#server/services/require-revision.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { contributionPage } from './contribution-page.ts';
import type { ContributionPageOnRecord } from './contribution-page.ts';
import { contributionTitle } from './contribution-title.ts';
import { holdOwnContribution } from './hold-contribution.ts';

type Save = HandlerInput<typeof saveEndpoint>['body'];

/**
 * Keeps a draft as it is typed, whole or half, wrong or right. With `baseVersion` it is from then on a change of that version, which is
 * the one in force: its author has seen both.
 *
 * @throws ProblemError `not-found`, `not-allowed`; `conflict` where it was saved elsewhere, is no draft, or the fact moved on again.
 */
export async function saveContribution(id: string, save: Save, { viewer }: RequestContext, knex: Knex): Promise<ContributionPageOnRecord> {
  const member = signedIn(viewer);
  return withTransaction(
    knex,
    async (trx) => {
      const contribution = await holdOwnContribution(viewer, id, trx);
      requireDraft(contribution);
      requireRevision(contribution, save.revision);
      if (save.baseVersion !== undefined) await requireInForce(contribution, save.baseVersion, trx);
      await contribution.$query(trx).patch({
        payload: save.payload,
        citations: save.sources,
        note: save.note === '' ? null : save.note,
        title: await contributionTitle(contribution.kind, contribution.subjectId, save.payload, trx),
        revision: contribution.revision + 1,
        changedAt: trx.raw('clock_timestamp()'),
        ...(save.baseVersion === undefined ? {} : { baseVersion: save.baseVersion }),
      });
      return contributionPage(viewer, id, trx);
    },
    { actorId: member.id },
  );
}

/** @throws ProblemError `conflict` for one that is not its author's to change. */
export function requireDraft({ state }: Contribution): void {
  switch (state) {
    case 'drafted':
    case 'sent-back':
      return;
    case 'put-forward':
      throw new ProblemError('conflict', 'It is put forward. A moderator may send it back, or you withdraw it.');
    case 'entered':
    case 'turned-down':
    case 'withdrawn':
      throw new ProblemError('conflict', 'It is done with. Begin a new one.');
  }
}

async function requireInForce({ kind, subjectId }: Contribution, baseVersion: number, trx: Knex.Transaction): Promise<void> {
  const versions = subjectId === null ? [] : await versionsOf({ id: subjectId, kind }, trx);
  const inForce = versions.find((version) => version.inForce);
  if (inForce?.number !== baseVersion) throw new ProblemError('conflict', 'That version is not in force. Look at what is first.');
}
