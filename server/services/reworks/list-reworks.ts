import type { Knex } from 'knex';
import { FactName } from '#db/models/fact-name.ts';
import { Rework } from '#db/models/rework.ts';
import { requireMaySeeReworks } from '#server/policies/reworks.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { countsBy } from '#server/services/counts-by.ts';
import { listPage } from '#server/services/list-page.ts';
import type { ListRequest, Order, Page } from '#server/services/list-page.ts';
import { matchText } from '#server/services/search.ts';

const ORDERS = {
  '-started': { keys: [{ column: 'reworks.startedAt', as: 'instant' }], direction: 'desc' },
} as const satisfies Record<string, Order>;

export type ReworkListing = ListRequest<keyof typeof ORDERS> & {
  /** Part of the fact’s title. */
  readonly q?: string | undefined;
};

export type ReworkOnRecord = {
  readonly rework: Rework;
  /** `null`: the fact has left the catalogue. */
  readonly name: FactName | null;
  readonly machinesChanged: number;
};

/**
 * What is and was worked out again.
 *
 * @throws ProblemError as `requireMaySeeReworks`.
 */
export async function listReworks(viewer: Viewer, request: ReworkListing, knex: Knex): Promise<Page<ReworkOnRecord>> {
  requireMaySeeReworks(viewer);
  const page = await listPage(
    {
      table: 'reworks',
      orders: ORDERS,
      request,
      filter: (query) => {
        const { q } = request;
        if (q) void query.whereIn('reworks.factId', knex('fact_names').select('id').modify((names: Knex.QueryBuilder) => { matchText(names, ['title'], q); }));
      },
      load: (ids, trx) => Rework.query(trx).findByIds([...ids]),
    },
    knex,
  );
  const names = await FactName.query(knex).whereIn('id', page.items.map(({ factId }) => factId));
  const machines = await countsBy({ table: 'rework_machines', owner: 'reworkId' }, page.items.map(({ id }) => id), knex);
  return {
    ...page,
    items: page.items.map((rework) => ({
      rework,
      name: names.find(({ id }) => id === rework.factId) ?? null,
      machinesChanged: machines.get(rework.id) ?? 0,
    })),
  };
}
