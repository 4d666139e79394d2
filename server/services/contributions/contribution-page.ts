import type { Knex } from 'knex';
import type { Difference } from '#contract/contributions.ts';
import { formOf } from '#contract/kinds.ts';
import type { FieldFault } from '#contract/problem.ts';
import { ContributionComment } from '#db/models/contribution-comment.ts';
import { ContributionDecision } from '#db/models/contribution-decision.ts';
import type { Contribution } from '#db/models/contribution.ts';
import type { Member } from '#db/models/member.ts';
import { contributionRights, mayReadComments, moderatesMaker, requireMayReadContribution } from '#server/policies/contributions.ts';
import type { ContributionRights } from '#server/policies/contributions.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { versionsOf } from '#server/services/facts/fact-versions.ts';
import type { VersionOnRecord } from '#server/services/facts/fact-versions.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { checkProposal } from './check-proposal.ts';
import { differencesOf } from '#server/services/facts/differences.ts';
import { loadContributions } from './load-contributions.ts';
import type { ContributionOnRecord } from './load-contributions.ts';
import { namesWithin } from '#server/services/facts/names-within.ts';
import type { NamesWithin } from '#server/services/facts/names-within.ts';
import { whoHasOpen } from './who-has-it-open.ts';

export type ContributionPageOnRecord = ContributionOnRecord & {
  readonly base: VersionOnRecord | null;
  readonly inForce: VersionOnRecord | null;
  readonly differences: readonly Difference[];
  readonly faults: readonly FieldFault[];
  readonly names: NamesWithin;
  /** A word to whoever decides; `null` for everybody else, and where there is none. */
  readonly note: string | null;
  readonly comments: readonly ContributionComment[];
  /** Everybody else is told the one that entered it. */
  readonly decisions: readonly ContributionDecision[];
  readonly openWith: readonly Member[];
  readonly can: ContributionRights;
};

/**
 * A contribution with everything its author, a moderator or anybody else may see of it. `knownFaults` are its faults where they were told
 * just now, so that they are not looked for again.
 *
 * @throws ProblemError `not-found`, `second-factor-owed`.
 */
export async function contributionPage(
  viewer: Viewer,
  id: string,
  knex: Knex,
  knownFaults?: readonly FieldFault[],
): Promise<ContributionPageOnRecord> {
  const [onRecord] = await loadContributions([id], knex);
  if (!onRecord) throw new ProblemError('not-found', 'No contribution of this id is for you to see.');
  const { contribution } = onRecord;
  requireMayReadContribution(viewer, contribution);
  const { kind, subjectId, baseVersion, payload, state } = contribution;

  const versions = subjectId === null ? [] : await versionsOf({ id: subjectId, kind }, knex);
  const base = versions.find(({ number }) => number === baseVersion) ?? null;
  const inForce = versions.find((version) => version.inForce) ?? null;
  const names = await namesWithin(kind, [contribution, base, inForce].flatMap((said) => said ?? []), knex);
  // What was entered is told against what it changed, not against what it became.
  const before = state === 'entered' ? base : inForce;
  const isBetween = mayReadComments(viewer, contribution);
  const decisions = await ContributionDecision.query(knex).where({ contributionId: id }).orderBy(['at', 'id']).withGraphFetched('by');
  return {
    ...onRecord,
    base,
    inForce,
    differences: differencesOf(formOf(kind), before?.payload ?? null, payload, names.nameOf),
    faults: knownFaults ?? (await faultsOf(contribution, knex)),
    names,
    note: isBetween ? contribution.note : null,
    comments: isBetween ? await commentsOn(id, knex) : [],
    decisions: isBetween ? decisions : decisions.filter(({ decision }) => decision === 'enter'),
    openWith: await openWith(viewer, onRecord, knex),
    can: contributionRights(viewer, contribution),
  };
}

/** What stands in the way of what is still to be entered. */
async function faultsOf({ kind, subjectId, authorId, payload, citations, state }: Contribution, knex: Knex): Promise<readonly FieldFault[]> {
  if (state === 'entered' || state === 'turned-down' || state === 'withdrawn') return [];
  const checked = await checkProposal({ kind, subjectId, authorId, payload, citations }, knex);
  return checked.ok ? [] : checked.fault;
}

function commentsOn(contributionId: string, knex: Knex): Promise<ContributionComment[]> {
  return ContributionComment.query(knex).where({ contributionId }).orderBy(['at', 'id']).withGraphFetched('author').execute();
}

async function openWith(viewer: Viewer, { id, contribution: { makerId } }: ContributionOnRecord, knex: Knex): Promise<readonly Member[]> {
  if (viewer.kind === 'visitor' || !moderatesMaker(viewer, makerId)) return [];
  return (await whoHasOpen([id], viewer.id, knex)).get(id) ?? [];
}
