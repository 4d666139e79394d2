import type { Knex } from 'knex';
import { SerialRange } from '#db/models/serial-range.ts';
import { listPage } from './list-page.ts';
import type { ListRequest, Order, Page } from './list-page.ts';
import { matchText } from './search.ts';

const BUILT = [{ column: 'serial_ranges.built', as: 'first-day' }] as const;
const ORDERS = {
  series: {
    keys: [
      { column: 'models.name', as: 'text' },
      { column: 'series.prefix', as: 'text' },
      { column: 'serial_ranges.numbers', as: 'first-number' },
    ],
    direction: 'asc',
  },
  dates: { keys: BUILT, direction: 'asc' },
  '-dates': { keys: BUILT, direction: 'desc' },
} as const satisfies Record<string, Order>;

const SERIAL_RANGE_GRAPH = '[series.[model, works, seriesAccounts], account]';

export type SerialRangeListing = ListRequest<keyof typeof ORDERS> & {
  readonly q?: string | undefined;
  readonly model?: string | undefined;
  readonly maker?: string | undefined;
};

export async function listSerialRanges(request: SerialRangeListing, knex: Knex): Promise<Page<SerialRange>> {
  return listPage(
    {
      table: 'serial_ranges',
      orders: ORDERS,
      request,
      filter: (query) => {
        const { q, model, maker } = request;
        void query
          .join('series', 'series.id', 'serial_ranges.seriesId')
          .join('models', 'models.id', 'series.modelId')
          .join('makers', 'makers.id', 'models.makerId');
        if (model) void query.where('models.slug', model);
        if (maker) void query.where('makers.slug', maker);
        if (q) matchText(query, ['models.name', 'series.prefix'], q);
      },
      load: (ids, trx) => SerialRange.query(trx).findByIds([...ids]).withGraphFetched(SERIAL_RANGE_GRAPH),
    },
    knex,
  );
}
