import type { Knex } from 'knex';
import { Rework } from '#db/models/rework.ts';
import { requireMaySeeReworks } from '#server/policies/reworks.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { countsBy } from '#server/services/counts-by.ts';
import { nameFacts } from '#server/services/facts/name-facts.ts';
import type { NamedFact } from '#server/services/facts/name-facts.ts';
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
  readonly fact: NamedFact;
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
  const names = await nameFacts(page.items.map(({ factId }) => factId), knex);
  const machines = await countsBy({ table: 'rework_machines', owner: 'reworkId' }, page.items.map(({ id }) => id), knex);
  return {
    ...page,
    items: page.items.map((rework) => ({ rework, fact: factOf(rework, names), machinesChanged: machines.get(rework.id) ?? 0 })),
  };
}

function factOf({ factId }: Rework, names: ReadonlyMap<string, NamedFact>): NamedFact {
  const fact = names.get(factId);
  if (fact === undefined) throw new RangeError('A rework is of a fact');
  return fact;
}
