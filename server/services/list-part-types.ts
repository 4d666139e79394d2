import type { Knex } from 'knex';
import { PartType } from '#db/models/part-type.ts';
import { countsBy } from './counts-by.ts';
import { listPage } from './list-page.ts';
import type { ListRequest, Order, Page } from './list-page.ts';
import { matchText } from './search.ts';

export type CountedPartType = { readonly partType: PartType; readonly castings: number };

const NAME = [{ column: 'part_types.name', as: 'text' }] as const;
const ORDERS = {
  name: { keys: NAME, direction: 'asc' },
  '-name': { keys: NAME, direction: 'desc' },
} as const satisfies Record<string, Order>;

export type PartTypeListing = ListRequest<keyof typeof ORDERS> & { readonly q?: string | undefined };

export async function listPartTypes(request: PartTypeListing, knex: Knex): Promise<Page<CountedPartType>> {
  const page = await listPage(
    {
      table: 'part_types',
      orders: ORDERS,
      request,
      filter: (query) => {
        if (request.q) matchText(query, ['part_types.name'], request.q);
      },
      load: (ids, trx) => PartType.query(trx).findByIds([...ids]),
    },
    knex,
  );
  const castings = await countsBy({ table: 'castings', owner: 'partTypeId' }, page.items.map(({ id }) => id), knex);
  return { ...page, items: page.items.map((partType) => ({ partType, castings: castings.get(partType.id) ?? 0 })) };
}
