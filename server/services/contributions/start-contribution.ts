import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import type { startContribution as startEndpoint } from '#contract/contributions.ts';
import type { HandlerInput } from '#contract/endpoint.ts';
import { formOf } from '#contract/kinds.ts';
import { Contribution } from '#db/models/contribution.ts';
import { Fact } from '#db/models/fact.ts';
import { signedIn } from '#server/policies/viewer.ts';
import { versionsOf } from '#server/services/facts/fact-versions.ts';
import type { VersionOnRecord } from '#server/services/facts/fact-versions.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { contributionPage } from './contribution-page.ts';
import type { ContributionPageOnRecord } from './contribution-page.ts';
import { contributionTitle } from './contribution-title.ts';
import { writeContributionAudit } from './write-contribution-audit.ts';

/** More than anybody works on at once. */
const MOST_DRAFTS = 100;

type Start = HandlerInput<typeof startEndpoint>['body'];

/**
 * Begins a contribution: of a new fact, or on the version of a fact that its author looks at.
 *
 * @throws ProblemError `not-signed-in`; `invalid` at `subjectId` or `baseVersion`; `conflict` where that version is no longer in force,
 *   and for whoever has a hundred drafts.
 */
export async function startContribution(start: Start, { viewer, requestId }: RequestContext, knex: Knex): Promise<ContributionPageOnRecord> {
  const member = signedIn(viewer);
  return withTransaction(
    knex,
    async (trx) => {
      const drafts = await Contribution.query(trx).where({ authorId: member.id, state: 'drafted' }).resultSize();
      if (drafts >= MOST_DRAFTS) throw new ProblemError('conflict', `You have ${MOST_DRAFTS} drafts. Put some forward, or throw some away, first.`);
      const base = await baseOf(start, trx);
      const payload = start.payload ?? base?.payload ?? {};
      const subjectId = start.subjectId ?? null;
      const contribution = await Contribution.query(trx).insertAndFetch({
        id: uuidV7(),
        authorId: member.id,
        kind: start.kind,
        subjectId,
        baseVersion: base?.number ?? null,
        title: await contributionTitle(start.kind, subjectId, payload, trx),
        makerId: null,
        state: 'drafted',
        payload,
        citations: start.sources ?? base?.citations.map((citation) => ({ ...citation, newSource: null })) ?? [],
        note: start.note === undefined || start.note === '' ? null : start.note,
      });
      await writeContributionAudit('contribution.started', contribution, { actorId: member.id, requestId }, trx);
      return contributionPage(viewer, contribution.id, trx);
    },
    { actorId: member.id },
  );
}

async function baseOf({ kind, subjectId, baseVersion }: Start, trx: Knex.Transaction): Promise<VersionOnRecord | null> {
  if (subjectId === undefined) {
    if (baseVersion !== undefined) throw invalid('baseVersion', 'Of which fact? Name it as well');
    return null;
  }
  if (!(await Fact.query(trx).findById(subjectId).where({ kind }))) throw invalid('subjectId', `No ${formOf(kind).name.toLowerCase()} of this id is on record`);
  const versions = await versionsOf({ id: subjectId, kind }, trx);
  const inForce = versions.find((version) => version.inForce);
  if (!inForce) throw new ProblemError('conflict', 'It was retired. A moderator can bring a version back.');
  if (baseVersion === undefined || baseVersion === inForce.number) return inForce;
  const isThere = versions.some(({ number }) => number === baseVersion);
  if (!isThere) throw invalid('baseVersion', 'It has no such version');
  throw new ProblemError('conflict', `Version ${inForce.number} is in force meanwhile. Look at that first.`);
}

function invalid(field: string, message: string): ProblemError {
  return new ProblemError('invalid', 'See which, and why, under errors.', { errors: [{ path: [field], message }] });
}
