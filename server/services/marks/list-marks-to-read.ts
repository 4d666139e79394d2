import type { Knex } from 'knex';
import type { MarkKind } from '#domain/vocabulary.ts';
import { signedIn } from '#server/policies/viewer.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { listPage } from '#server/services/list-page.ts';
import type { ListRequest, Order, Page } from '#server/services/list-page.ts';
import { matchText } from '#server/services/search.ts';
import { readOrLookedAtBy } from './acquaintances.ts';
import type { MarkOnList } from './list-marks.ts';
import { loadMarks } from './load-marks.ts';

const ORDERS = {
  asked: { keys: [{ column: 'marks.wantsReadingSince', as: 'instant' }], direction: 'asc' },
} as const satisfies Record<string, Order>;

type MarkToReadListing = ListRequest<keyof typeof ORDERS> & {
  readonly q?: string | undefined;
  readonly kind?: MarkKind | undefined;
};

/**
 * Marks of others that want another reading, and that the member has neither read nor been shown: those asked for longest first.
 *
 * @throws ProblemError `not-signed-in`; `invalid` at `after`.
 */
export async function listMarksToRead(viewer: Viewer, request: MarkToReadListing, knex: Knex): Promise<Page<MarkOnList>> {
  const member = signedIn(viewer);
  return listPage(
    {
      table: 'marks',
      orders: ORDERS,
      request,
      filter: (query) => {
        const { q, kind } = request;
        void query
          .join('parts', 'parts.id', 'marks.partId')
          .leftJoin('part_types', 'part_types.id', 'parts.partTypeId')
          .whereNotNull('marks.wantsReadingSince')
          .whereNot('parts.holderId', member.id);
        for (const mine of readOrLookedAtBy(member.id, knex)) void query.whereNotExists(mine);
        if (kind) void query.where('marks.kind', kind);
        if (q) matchText(query, ['part_types.name'], q);
      },
      load: async (ids, trx) => (await loadMarks(ids, member, trx)).map((inView) => ({ id: inView.mark.id, inView })),
    },
    knex,
  );
}
