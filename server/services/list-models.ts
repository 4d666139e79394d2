import type { Knex } from 'knex';
import { MachineModel } from '#db/models/machine-model.ts';
import { listPage } from './list-page.ts';
import type { ListRequest, Order, Page } from './list-page.ts';
import { matchText } from './search.ts';

const NAME = { column: 'models.name', as: 'text' } as const;
const ORDERS = {
  name: { keys: [NAME], direction: 'asc' },
  '-name': { keys: [NAME], direction: 'desc' },
  maker: { keys: [{ column: 'makers.name', as: 'text' }, NAME], direction: 'asc' },
} as const satisfies Record<string, Order>;

export type ModelListing = ListRequest<keyof typeof ORDERS> & { readonly q?: string | undefined; readonly maker?: string | undefined };

export async function listModels(request: ModelListing, knex: Knex): Promise<Page<MachineModel>> {
  return listPage(
    {
      table: 'models',
      orders: ORDERS,
      request,
      filter: (query) => {
        const { q, maker } = request;
        void query.join('makers', 'makers.id', 'models.makerId');
        if (maker) void query.where('makers.slug', maker);
        if (q) matchText(query, ['models.name', 'makers.name'], q);
      },
      load: (ids, trx) => MachineModel.query(trx).findByIds([...ids]).withGraphFetched('maker'),
    },
    knex,
  );
}
