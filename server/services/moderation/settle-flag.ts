import type { Knex } from 'knex';
import { Flag } from '#db/models/flag.ts';
import { moderatesMaker, requireNotOwn } from '#server/policies/contributions.ts';
import { requireQueueReader } from '#server/policies/moderation.ts';
import { signedIn } from '#server/policies/viewer.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { asLabel } from '#server/services/facts/as-label.ts';
import { notify } from '#server/services/notices/notify.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { loadFlags } from './load-flags.ts';
import type { FlagOnRecord } from './load-flags.ts';

type Settlement = { readonly outcome: 'acted' | 'kept'; readonly reason: string };

/**
 * Says what became of a flag; whoever raised it is told.
 *
 * @throws ProblemError `not-signed-in`, `not-found`, `second-factor-owed`; `not-allowed` for one's own and for a registrar; `conflict`
 *   where another moderator was first, saying what they did.
 */
export async function settleFlag(
  id: string,
  { outcome, reason }: Settlement,
  { viewer, requestId }: RequestContext,
  knex: Knex,
): Promise<FlagOnRecord> {
  const member = signedIn(viewer);
  const { makerIds } = requireQueueReader(viewer);
  return withTransaction(
    knex,
    async (trx) => {
      const flag = await Flag.query(trx).findById(id).forUpdate();
      if (!flag || (makerIds !== 'all' && (flag.makerId === null || !makerIds.includes(flag.makerId)))) {
        throw new ProblemError('not-found', 'No flag of this id is for you to see.');
      }
      if (!moderatesMaker(viewer, flag.makerId)) throw new ProblemError('not-allowed', 'Only a moderator settles a flag.');
      requireNotOwn(member, flag.byId);
      await requireWaiting(flag, trx);
      await flag.$query(trx).patch({ outcome, settledById: member.id, settledAt: trx.raw('clock_timestamp()'), settledReason: reason });
      const detail = { factId: flag.factId, outcome };
      await writeAudit({ act: 'flag.settled', actorId: member.id, subject: { kind: 'flag', id }, detail, requestId }, trx);
      const told = outcome === 'acted' ? 'What you flagged was seen to' : 'What you flagged stays as it is';
      const href = `/facts/${flag.factId}/history`;
      await notify({ memberId: flag.byId, kind: 'contribution', title: asLabel(`${told}: ${flag.title}`), body: reason, href }, trx);
      const [settled] = await loadFlags([id], trx);
      if (!settled) throw new RangeError('A flag is about a fact');
      return settled;
    },
    { actorId: member.id },
  );
}

async function requireWaiting(flag: Flag, trx: Knex.Transaction): Promise<void> {
  if (flag.outcome === null) return;
  const [onRecord] = await loadFlags([flag.id], trx);
  const who = onRecord?.flag.settledBy?.displayName ?? 'A moderator';
  const did = flag.outcome === 'acted' ? 'saw to it' : 'left it as it is';
  throw new ProblemError('conflict', `${who} ${did} meanwhile: ${flag.settledReason ?? ''}`);
}
