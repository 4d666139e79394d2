import type { Knex } from 'knex';
import type { SourceKind } from '#domain/vocabulary.ts';
import { Source } from '#db/models/source.ts';
import { countsBy } from './counts-by.ts';
import { listPage } from './list-page.ts';
import type { ListRequest, Order, Page } from './list-page.ts';
import { matchText } from './search.ts';

export type CountedSource = {
  readonly source: Source;
  /** How often it is cited. */
  readonly facts: number;
};

const TITLE = [{ column: 'sources.title', as: 'text' }] as const;
const ORDERS = {
  title: { keys: TITLE, direction: 'asc' },
  '-title': { keys: TITLE, direction: 'desc' },
} as const satisfies Record<string, Order>;

export type SourceListing = ListRequest<keyof typeof ORDERS> & { readonly q?: string | undefined; readonly kind?: SourceKind | undefined };

export async function listSources(request: SourceListing, knex: Knex): Promise<Page<CountedSource>> {
  const page = await listPage(
    {
      table: 'sources',
      orders: ORDERS,
      request,
      filter: (query) => {
        const { q, kind } = request;
        if (kind) void query.where({ kind });
        if (q) matchText(query, ['title', 'author'], q);
      },
      load: (ids, trx) => Source.query(trx).findByIds([...ids]),
    },
    knex,
  );
  const facts = await citationsOf(page.items.map(({ id }) => id), knex);
  return { ...page, items: page.items.map((source) => ({ source, facts: facts.get(source.id) ?? 0 })) };
}

function citationsOf(sourceIds: readonly string[], knex: Knex): Promise<ReadonlyMap<string, number>> {
  return countsBy({ table: 'fact_sources', owner: 'sourceId' }, sourceIds, knex);
}
