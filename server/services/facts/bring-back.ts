import type { Knex } from 'knex';
import { Citations } from '#contract/citations.ts';
import { requireNotOwn } from '#server/policies/contributions.ts';
import { signedIn } from '#server/policies/viewer.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { asLabel } from './as-label.ts';
import { parsePayload } from '#server/services/kinds/parse-payload.ts';
import { notify } from '#server/services/notices/notify.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { enterVersion } from './enter-version.ts';
import { holdFact } from './hold-fact.ts';
import { readFactHistory } from './read-fact-history.ts';
import type { FactHistoryOnRecord } from './read-fact-history.ts';
import { tellPassedOver } from './tell-passed-over.ts';

export type BringBack = {
  readonly version: number;
  readonly reason: string;
  /** The one the moderator saw in force; `null`: none. */
  readonly inForce: number | null;
};

/**
 * Enters what an older version said as a new one, under the name of whoever gave it. A retired fact comes back so, under its old id.
 *
 * @throws ProblemError what `holdFact` throws; `not-allowed` for one's own version; `invalid` at `version`; `conflict` where it is in
 *   force, or the rest of the catalogue says otherwise by now.
 */
export async function bringBack(
  id: string,
  { version, reason, inForce: lookedAt }: BringBack,
  { viewer, requestId }: RequestContext,
  knex: Knex,
): Promise<FactHistoryOnRecord> {
  const { id: actorId } = signedIn(viewer);
  return withTransaction(
    knex,
    async (trx) => {
      const { fact, name, moderator, versions, inForce } = await holdFact(viewer, id, lookedAt, trx);
      const older = versions.find(({ number }) => number === version);
      if (!older) throw new ProblemError('invalid', 'See which, and why, under errors.', { errors: [{ path: ['version'], message: 'It has no such version' }] });
      if (older.inForce) throw new ProblemError('conflict', 'That version is in force.');
      requireNotOwn(moderator, older.enteredById);

      const { kind } = fact;
      const payload = parsePayload(kind, older.payload);
      const citations = Citations.safeParse(older.citations.map((citation) => ({ ...citation, newSource: null })));
      if (!payload.ok || !citations.success) throw new ProblemError('conflict', 'What that version says is no longer taken. Put a change forward instead.');
      const entered = await enterVersion(
        {
          kind,
          factId: id,
          payload: payload.value,
          citations: citations.data,
          enteredById: older.enteredById,
          decidedById: actorId,
          reason,
          contributionId: null,
          broughtBack: version,
        },
        trx,
      );
      const detail = { factId: id, kind, version: entered.version, broughtBack: version };
      await writeAudit({ act: 'fact.brought-back', actorId, subject: { kind, id }, detail, requestId }, trx);
      const href = `/facts/${id}/history`;
      await notify({ memberId: older.enteredById, kind: 'contribution', title: asLabel(`Brought back: ${name.title}`), body: reason, href }, trx);
      const without = [older.enteredById, actorId];
      await tellPassedOver({ before: inForce, title: name.title, told: 'An older version was brought back in place of yours', without, href }, trx);
      return readFactHistory(viewer, id, trx);
    },
    { actorId },
  );
}
