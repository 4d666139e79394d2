import type { Knex } from 'knex';
import { SeriesAccount } from '#db/models/series-account.ts';
import { Series } from '#db/models/series.ts';
import { requireModerator } from '#server/policies/contributions.ts';
import { signedIn } from '#server/policies/viewer.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { startRework } from '#server/services/reworks/start-rework.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { versionsOf } from './fact-versions.ts';
import { lockFact } from './write-version.ts';

/**
 * Marks one of the accounts that speak of a series as the register's reading, in place of the one that was.
 *
 * @throws ProblemError `not-signed-in`, `not-found`, `not-allowed`, `second-factor-owed`; `invalid` at `accountId` for an account that
 *   does not speak of it; `conflict` where it is the reading already.
 */
export async function markRegistersReading(
  seriesId: string,
  { accountId, reason }: { readonly accountId: string; readonly reason: string },
  { viewer, requestId }: RequestContext,
  knex: Knex,
): Promise<string> {
  const { id: actorId } = signedIn(viewer);
  return withTransaction(
    knex,
    async (trx) => {
      await lockFact(seriesId, trx);
      const series = await Series.query(trx).findById(seriesId);
      if (!series) throw new ProblemError('not-found', 'No series of this id is in the catalogue.');
      requireModerator(viewer, series.makerId);
      const accounts = await SeriesAccount.query(trx).where({ seriesId });
      const chosen = accounts.find((one) => one.accountId === accountId);
      if (!chosen) {
        throw new ProblemError('invalid', 'See which, and why, under errors.', {
          errors: [{ path: ['accountId'], message: 'No account of this id speaks of the series' }],
        });
      }
      if (chosen.preferred) throw new ProblemError('conflict', 'It is the register’s reading already.');
      await SeriesAccount.query(trx).where({ seriesId, preferred: true }).patch({ preferred: false });
      await SeriesAccount.query(trx).where({ seriesId, accountId }).patch({ preferred: true });

      const kind = 'series';
      const before = accounts.find((one) => one.preferred)?.accountId ?? null;
      const [inForce] = await versionsOf({ id: seriesId, kind }, trx);
      const rests = { makers: [], models: [series.modelId] };
      await startRework({ factId: seriesId, kind, version: inForce?.number ?? null, rests }, trx);
      const detail = { factId: seriesId, kind, accountId, before, reason };
      await writeAudit({ act: 'series.reading-marked', actorId, subject: { kind, id: seriesId }, detail, requestId }, trx);
      return accountId;
    },
    { actorId },
  );
}
