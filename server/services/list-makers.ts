import type { Knex } from 'knex';
import { Maker } from '#db/models/maker.ts';
import { countsBy } from './counts-by.ts';
import { listPage } from './list-page.ts';
import type { ListRequest, Order, Page } from './list-page.ts';
import { matchText } from './search.ts';

export type MakerCounts = { readonly models: number; readonly castings: number; readonly ciphers: number };
export type CountedMaker = { readonly maker: Maker; readonly counts: MakerCounts };

const NAME = [{ column: 'makers.name', as: 'text' }] as const;
const ORDERS = {
  name: { keys: NAME, direction: 'asc' },
  '-name': { keys: NAME, direction: 'desc' },
} as const satisfies Record<string, Order>;

export type MakerListing = ListRequest<keyof typeof ORDERS> & { readonly q?: string | undefined };

export async function listMakers(request: MakerListing, knex: Knex): Promise<Page<CountedMaker>> {
  const page = await listPage(
    {
      table: 'makers',
      orders: ORDERS,
      request,
      filter: (query) => {
        const { q } = request;
        if (q) matchText(query, ['makers.name', 'makers.place'], q);
      },
      load: (ids, trx) => Maker.query(trx).findByIds([...ids]),
    },
    knex,
  );
  const counts = await countsOfMakers(page.items.map(({ id }) => id), knex);
  return { ...page, items: page.items.map((maker) => ({ maker, counts: counts(maker.id) })) };
}

/** What each maker has; a cipher is the maker's and that of the foundry that poured under it. */
export async function countsOfMakers(ids: readonly string[], knex: Knex): Promise<(id: string) => MakerCounts> {
  const models = await countsBy({ table: 'models', owner: 'makerId' }, ids, knex);
  const castings = await countsBy({ table: 'castings', owner: 'makerId' }, ids, knex);
  const ciphers = await countsBy({ table: 'ciphers', owner: 'makerId' }, ids, knex);
  const foundryCiphers = await countsBy({ table: 'ciphers', owner: 'foundryId' }, ids, knex);
  return (id) => ({
    models: models.get(id) ?? 0,
    castings: castings.get(id) ?? 0,
    ciphers: (ciphers.get(id) ?? 0) + (foundryCiphers.get(id) ?? 0),
  });
}
