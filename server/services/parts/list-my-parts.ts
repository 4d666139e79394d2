import type { Knex } from 'knex';
import { signedIn } from '#server/policies/viewer.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { listPage } from '#server/services/list-page.ts';
import type { ListRequest, Order, Page } from '#server/services/list-page.ts';
import { matchText } from '#server/services/search.ts';
import { loadParts } from './load-parts.ts';
import type { PartInView } from './load-parts.ts';
import { joinPartTitles } from './part-title.ts';

const RECORDED = [{ column: 'parts.recordedAt', as: 'instant' }] as const;
const ORDERS = {
  '-recorded': { keys: RECORDED, direction: 'desc' },
  recorded: { keys: RECORDED, direction: 'asc' },
  title: { keys: [{ column: 'part_titles.title', as: 'text' }], direction: 'asc' },
} as const satisfies Record<string, Order>;

export type PartListing = ListRequest<keyof typeof ORDERS> & {
  readonly q?: string | undefined;
  readonly on?: 'bench' | 'machine' | undefined;
  /** Slug. */
  readonly partType?: string | undefined;
};

/**
 * A member's own parts and nobody else's.
 *
 * @throws ProblemError `not-signed-in`; `invalid` at `after`.
 */
export async function listMyParts(viewer: Viewer, request: PartListing, knex: Knex): Promise<Page<PartOnList>> {
  const member = signedIn(viewer);
  return listPage(
    {
      table: 'parts',
      orders: ORDERS,
      request,
      filter: (query) => {
        const { q, on, partType } = request;
        joinPartTitles(query, knex);
        void query.leftJoin('part_types', 'part_types.id', 'parts.partTypeId').leftJoin('makers', 'makers.id', 'parts.makerId').where('parts.holderId', member.id);
        if (on !== undefined) query[on === 'machine' ? 'whereExists' : 'whereNotExists'](fittingNow(knex));
        if (partType) void query.where('part_types.slug', partType);
        if (q) {
          void query.where((any) => {
            matchText(any, ['part_titles.title', 'parts.called', 'makers.name', 'parts.condition', 'parts.foundSerial'], q);
            void any.orWhereExists(marksSaying(q, knex));
          });
        }
      },
      load: async (ids, trx) => (await loadParts(ids, member, trx)).map((inView) => ({ id: inView.part.id, inView })),
    },
    knex,
  );
}

type PartOnList = { readonly id: string; readonly inView: PartInView };

function fittingNow(knex: Knex): Knex.QueryBuilder {
  return knex('part_fittings').where('part_fittings.partId', knex.ref('parts.id')).whereRaw('upper_inf(part_fittings.fitted)').select(knex.raw('1'));
}

function marksSaying(text: string, knex: Knex): Knex.QueryBuilder {
  const query = knex('marks').where('marks.partId', knex.ref('parts.id')).select(knex.raw('1'));
  matchText(query, ['marks.reading', 'marks.readingKey'], text);
  return query;
}
