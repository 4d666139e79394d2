import type { Knex } from 'knex';
import { FactRetirement } from '#db/models/fact-retirement.ts';
import { FactSource } from '#db/models/fact-source.ts';
import { requireNotOwn } from '#server/policies/contributions.ts';
import { signedIn } from '#server/policies/viewer.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { kindModule } from '#server/services/kinds/all-kinds.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { startRework } from '#server/services/reworks/start-rework.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { restsOf } from './enter-version.ts';
import type { FactIdentity } from './fact-versions.ts';
import { holdFact } from './hold-fact.ts';
import { readFactHistory } from './read-fact-history.ts';
import type { FactHistoryOnRecord } from './read-fact-history.ts';
import { nativeOf } from './refusal-of.ts';
import { tellPassedOver } from './tell-passed-over.ts';
import { sayReferrers } from './say-referrers.ts';
import { supersede } from './write-version.ts';

export type Retirement = {
  readonly reason: string;
  /** The version the moderator saw in force. */
  readonly inForce: number;
};

/** PostgreSQL: a row is referred to. */
const REFERRED_TO = '23503';

/**
 * Takes a fact that was wrong out of the catalogue. Its versions stay, and any of them can be brought back.
 *
 * @throws ProblemError what `holdFact` throws; `not-allowed` for one's own; `conflict` where other facts rest on it, naming them.
 */
export async function retireFact(
  id: string,
  { reason, inForce: lookedAt }: Retirement,
  { viewer, requestId }: RequestContext,
  knex: Knex,
): Promise<FactHistoryOnRecord> {
  const { id: actorId } = signedIn(viewer);
  return withTransaction(
    knex,
    async (trx) => {
      const { fact, name, moderator, inForce } = await holdFact(viewer, id, lookedAt, trx);
      if (inForce === null) throw new ProblemError('conflict', 'It is retired already.');
      requireNotOwn(moderator, inForce.enteredById);
      const { kind } = fact;
      const rests = await restsOf(kind, inForce, trx);

      await removeRow(fact, trx);
      await FactSource.query(trx).delete().where({ factId: id });
      const at = await supersede(fact, inForce, trx);
      await FactRetirement.query(trx).insert({ factId: id, version: inForce.number, retiredById: actorId, at, reason });
      await startRework({ factId: id, kind, version: null, rests }, trx);
      const detail = { factId: id, kind, version: inForce.number };
      await writeAudit({ act: 'fact.retired', actorId, subject: { kind, id }, detail, requestId }, trx);
      const href = `/facts/${id}/history`;
      await tellPassedOver({ before: inForce, title: name.title, told: `It was retired: ${reason}`, without: [actorId], href }, trx);
      return readFactHistory(viewer, id, trx);
    },
    { actorId },
  );
}

async function removeRow({ kind, id }: FactIdentity, trx: Knex.Transaction): Promise<void> {
  try {
    await trx.transaction((savepoint) => kindModule(kind).remove(id, savepoint));
  } catch (cause) {
    if (nativeOf(cause).code !== REFERRED_TO) throw cause;
    throw new ProblemError('conflict', `${await sayReferrers(cause, id, trx)} Change or retire that first.`, { cause });
  }
}
