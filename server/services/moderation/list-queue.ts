import type { Knex } from 'knex';
import type { Member } from '#db/models/member.ts';
import { QueueRow } from '#db/models/queue-row.ts';
import type { FactKind } from '#domain/vocabulary.ts';
import { requireQueueReader } from '#server/policies/moderation.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { loadContributions } from '#server/services/contributions/load-contributions.ts';
import type { ContributionOnRecord } from '#server/services/contributions/load-contributions.ts';
import { whoHasOpen } from '#server/services/contributions/who-has-it-open.ts';
import { listPage } from '#server/services/list-page.ts';
import type { ListRequest, Order, Page } from '#server/services/list-page.ts';
import { matchText } from '#server/services/search.ts';
import { loadFlags } from './load-flags.ts';
import type { FlagOnRecord } from './load-flags.ts';

const AT = [{ column: 'moderation_queue.at', as: 'instant' }] as const;
const ORDERS = {
  at: { keys: AT, direction: 'asc' },
  '-at': { keys: AT, direction: 'desc' },
} as const satisfies Record<string, Order>;

export type QueueListing = ListRequest<keyof typeof ORDERS> & {
  readonly q?: string | undefined;
  readonly type?: QueueRow['type'] | undefined;
  readonly kind?: FactKind | undefined;
  /** A maker's slug. */
  readonly maker?: string | undefined;
};

export type QueueItemOnRecord = { readonly id: string; readonly at: string } & (
  | { readonly type: 'contribution'; readonly contribution: ContributionOnRecord; readonly openWith: readonly Member[]; readonly own: boolean }
  | { readonly type: 'flag'; readonly flag: FlagOnRecord }
);

/**
 * What waits for a decision on the makers in scope. Registrars see all of it.
 *
 * @throws ProblemError `not-signed-in`, `not-found`, `second-factor-owed`.
 */
export async function listQueue(viewer: Viewer, request: QueueListing, knex: Knex): Promise<Page<QueueItemOnRecord>> {
  const reader = requireQueueReader(viewer);
  return listPage(
    {
      table: 'moderation_queue',
      orders: ORDERS,
      request,
      filter: (query) => {
        const { q, type, kind, maker } = request;
        if (reader.makerIds !== 'all') void query.whereIn('makerId', [...reader.makerIds]);
        if (type) void query.where({ type });
        if (kind) void query.where({ kind });
        if (maker) void query.whereIn('makerId', knex('makers').where({ slug: maker }).select('id'));
        if (q) matchText(query, ['title'], q);
      },
      load: (ids, trx) => loadQueueItems(ids, reader.id, trx),
    },
    knex,
  );
}

async function loadQueueItems(ids: readonly string[], viewerId: string, trx: Knex.Transaction): Promise<readonly QueueItemOnRecord[]> {
  const rows = await QueueRow.query(trx).whereIn('id', [...ids]);
  const idsOf = (type: QueueRow['type']): string[] => rows.filter((row) => row.type === type).map(({ id }) => id);
  const contributions = new Map((await loadContributions(idsOf('contribution'), trx)).map((one) => [one.id, one]));
  const flags = new Map((await loadFlags(idsOf('flag'), trx)).map((one) => [one.id, one]));
  const open = await whoHasOpen(idsOf('contribution'), viewerId, trx);
  return rows.flatMap(({ id, at }): QueueItemOnRecord[] => {
    const contribution = contributions.get(id);
    if (contribution) {
      const own = contribution.contribution.authorId === viewerId;
      return [{ type: 'contribution', id, at, contribution, openWith: open.get(id) ?? [], own }];
    }
    const flag = flags.get(id);
    return flag ? [{ type: 'flag', id, at, flag }] : [];
  });
}
