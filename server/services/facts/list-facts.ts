import type { Knex } from 'knex';
import { FactName } from '#db/models/fact-name.ts';
import { Maker } from '#db/models/maker.ts';
import type { FactKind } from '#domain/vocabulary.ts';
import { kindModule } from '#server/services/kinds/all-kinds.ts';
import { listPage } from '#server/services/list-page.ts';
import type { ListRequest, Order, Page } from '#server/services/list-page.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { matchText } from '#server/services/search.ts';

const ORDERS = {
  title: { keys: [{ column: 'fact_names.title', as: 'text' }], direction: 'asc' },
} as const satisfies Record<string, Order>;

export type FactListing = ListRequest<keyof typeof ORDERS> & {
  readonly kind: FactKind;
  readonly q?: string | undefined;
  /** Only what belongs to this fact. */
  readonly within?: string | undefined;
};

export type FactToChoose = { readonly id: string; readonly fact: FactName; readonly maker: Maker | null };

/**
 * The facts of a kind in the catalogue, by name, to choose one.
 *
 * @throws ProblemError `invalid` at `within` for an id of no fact in the catalogue.
 */
export async function listFacts(request: FactListing, knex: Knex): Promise<Page<FactToChoose>> {
  const { kind, q } = request;
  const belonging = request.within === undefined ? undefined : await belongingTo(kind, request.within, knex);
  return listPage(
    {
      table: 'fact_names',
      orders: ORDERS,
      request,
      filter: (query) => {
        void query.where({ kind });
        if (belonging) void query.where(belonging);
        if (q) matchText(query, ['title'], q);
      },
      load: async (ids, trx) => {
        const facts = await FactName.query(trx).whereIn('id', [...ids]);
        const makers = await Maker.query(trx).findByIds(facts.flatMap(({ makerId }) => makerId ?? []));
        return facts.map((fact) => ({ id: fact.id, fact, maker: makers.find(({ id }) => id === fact.makerId) ?? null }));
      },
    },
    knex,
  );
}

/** Which facts of a kind belong to a fact: those that have the same of what tells the kind's facts apart. */
async function belongingTo(kind: FactKind, within: string, knex: Knex): Promise<Readonly<Record<string, string>>> {
  const fact = await FactName.query(knex).findById(within);
  if (!fact) {
    throw new ProblemError('invalid', 'See which, and why, under errors.', { errors: [{ path: ['within'], message: 'No fact of this id is in the catalogue' }] });
  }
  const { belongsBy } = kindModule(kind);
  const owner = fact[belongsBy];
  return owner === null ? {} : { [belongsBy]: owner };
}
