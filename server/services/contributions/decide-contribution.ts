import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import type { AuditAct } from '#contract/admin.ts';
import { ContributionDecision } from '#db/models/contribution-decision.ts';
import { ContributionOpening } from '#db/models/contribution-opening.ts';
import type { Contribution } from '#db/models/contribution.ts';
import type { ContributionState, Decision } from '#domain/vocabulary.ts';
import { requireModerator, requireNotOwn } from '#server/policies/contributions.ts';
import { signedIn } from '#server/policies/viewer.ts';
import { enterVersion } from '#server/services/facts/enter-version.ts';
import { tellPassedOver } from '#server/services/facts/tell-passed-over.ts';
import { lockFact } from '#server/services/facts/write-version.ts';
import type { WrittenVersion } from '#server/services/facts/write-version.ts';
import { versionsOf } from '#server/services/facts/fact-versions.ts';
import { notify } from '#server/services/notices/notify.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { checkProposal } from './check-proposal.ts';
import { contributionPage } from './contribution-page.ts';
import type { ContributionPageOnRecord } from './contribution-page.ts';
import { asLabel } from '#server/services/facts/as-label.ts';
import { requireRevision } from '#server/services/require-revision.ts';
import { requireNotDecided } from './decided-meanwhile.ts';
import { holdContribution } from './hold-contribution.ts';
import { writeContributionAudit } from './write-contribution-audit.ts';

export type NewDecision = {
  readonly decision: Decision;
  readonly reason: string;
  /** The one the moderator looked at. */
  readonly revision: number;
};

type Outcome = { readonly state: ContributionState; readonly act: Extract<AuditAct, `contribution.${string}`>; readonly told: string };

const OUTCOMES: Readonly<Record<Decision, Outcome>> = {
  enter: { state: 'entered', act: 'contribution.entered', told: 'Entered' },
  'send-back': { state: 'sent-back', act: 'contribution.sent-back', told: 'Sent back' },
  'turn-down': { state: 'turned-down', act: 'contribution.turned-down', told: 'Turned down' },
};

/**
 * Decides about a contribution, as a moderator of its maker and never as its author. Entering it brings a version into force in the same
 * transaction. Of two who decide at once the second is told what the first did.
 *
 * @throws ProblemError `not-signed-in`, `not-found`, `not-allowed`, `second-factor-owed`; `conflict` where it was decided, withdrawn or
 *   changed meanwhile, where the fact moved on from the version it was begun on, or where the catalogue says otherwise by now.
 */
export async function decideContribution(
  id: string,
  { decision, reason, revision }: NewDecision,
  { viewer, requestId }: RequestContext,
  knex: Knex,
): Promise<ContributionPageOnRecord> {
  const { id: actorId } = signedIn(viewer);
  return withTransaction(
    knex,
    async (trx) => {
      const contribution = await holdContribution(viewer, id, trx);
      const { authorId } = contribution;
      requireNotOwn(signedIn(viewer), authorId);
      requireModerator(viewer, contribution.makerId);
      await requireNotDecided(contribution, trx);
      requireRevision(contribution, revision);

      const { state, act, told } = OUTCOMES[decision];
      const entered = decision === 'enter' ? await enter(contribution, actorId, reason, trx) : undefined;
      await contribution.$query(trx).patch({
        state,
        decidedById: actorId,
        decidedAt: trx.raw('clock_timestamp()'),
        changedAt: trx.raw('clock_timestamp()'),
        ...(entered ? { subjectId: entered.factId, enteredVersion: entered.version } : {}),
      });
      await ContributionDecision.query(trx).insert({ id: uuidV7(), contributionId: id, revision, decision, reason, byId: actorId });
      await ContributionOpening.query(trx).delete().where({ contributionId: id });
      const more = entered ? { factId: entered.factId, version: entered.version } : {};
      await writeContributionAudit(act, contribution, { actorId, requestId }, trx, more);
      const href = `/contributions/${id}`;
      await notify({ memberId: authorId, kind: 'contribution', title: asLabel(`${told}: ${contribution.title}`), body: reason, href }, trx);
      if (entered) {
        const passedOver = { before: entered.before, title: contribution.title, without: [authorId, actorId], href };
        await tellPassedOver({ ...passedOver, told: 'Another version took the place of yours' }, trx);
      }
      return contributionPage(viewer, id, trx);
    },
    { actorId },
  );
}

async function enter(contribution: Contribution, decidedById: string, reason: string, trx: Knex.Transaction): Promise<WrittenVersion> {
  const { id, kind, subjectId, authorId, payload, citations } = contribution;
  await requireBaseInForce(contribution, trx);
  const checked = await checkProposal({ kind, subjectId, authorId, payload, citations }, trx);
  if (!checked.ok) {
    const [first] = checked.fault;
    throw new ProblemError('conflict', `It can no longer be entered as it is: ${first?.message ?? 'see under errors'}. Send it back, saying so.`, {
      errors: checked.fault,
    });
  }
  return enterVersion(
    { kind, factId: subjectId, ...checked.value, enteredById: authorId, decidedById, reason, contributionId: id, broughtBack: null },
    trx,
  );
}

/** @throws ProblemError `conflict` where the fact moved on, or is no more. */
async function requireBaseInForce({ kind, subjectId, baseVersion }: Contribution, trx: Knex.Transaction): Promise<void> {
  if (subjectId === null) return;
  await lockFact(subjectId, trx);
  const inForce = (await versionsOf({ id: subjectId, kind }, trx)).find((version) => version.inForce);
  if (inForce?.number === baseVersion) return;
  throw new ProblemError(
    'conflict',
    inForce
      ? `It was begun on version ${baseVersion}, and version ${inForce.number} is in force by now. Send it back, so that its author can carry it over.`
      : 'The fact was retired meanwhile. Turn it down, or bring the fact back first.',
  );
}
