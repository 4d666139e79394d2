import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import { z } from 'zod';
import { FactName } from '#db/models/fact-name.ts';
import { signedIn } from '#server/policies/viewer.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { asLabel } from './as-label.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { withTransaction } from '#server/services/transaction.ts';

const Inserted = z.array(z.object({ id: z.string() }));

/**
 * Tells the moderators of a fact's maker that something is wrong with it. Answers the flag's id.
 *
 * @throws ProblemError `not-signed-in`; `not-found` for what is not in the catalogue; `conflict` while an earlier flag of theirs waits.
 */
export async function flagFact(factId: string, reason: string, { viewer, requestId }: RequestContext, knex: Knex): Promise<string> {
  const { id: byId } = signedIn(viewer);
  return withTransaction(
    knex,
    async (trx) => {
      const fact = await FactName.query(trx).findById(factId);
      if (!fact) throw new ProblemError('not-found', 'No fact of this id is in the catalogue.');
      const { kind, title, makerId } = fact;
      const inserted: unknown = await trx('flags')
        .insert({ id: uuidV7(), factId, title: asLabel(title), makerId, byId, reason })
        .onConflict(trx.raw('(fact_id, by_id) where settled_at is null'))
        .ignore()
        .returning('id');
      const [flag] = Inserted.parse(inserted);
      if (!flag) throw new ProblemError('conflict', 'You flagged it before, and the moderators have not come to it yet.');
      await writeAudit({ act: 'fact.flagged', actorId: byId, subject: { kind, id: factId }, detail: { factId, kind, flagId: flag.id }, requestId }, trx);
      return flag.id;
    },
    { actorId: byId },
  );
}
