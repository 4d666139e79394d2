import type { Knex } from 'knex';
import { Account } from '#db/models/account.ts';
import { listPage } from '#server/services/list-page.ts';
import type { ListRequest, Order, Page } from '#server/services/list-page.ts';
import { matchText } from '#server/services/search.ts';

const ORDERS = { title: { keys: [{ column: 'accounts.title', as: 'text' }], direction: 'asc' } } as const satisfies Record<string, Order>;

export type AccountListing = ListRequest<keyof typeof ORDERS> & { readonly q?: string | undefined };

/** The accounts of serial ranges, by title. */
export async function listAccounts(request: AccountListing, knex: Knex): Promise<Page<Account>> {
  return listPage(
    {
      table: 'accounts',
      orders: ORDERS,
      request,
      filter: (query) => {
        if (request.q) matchText(query, ['title'], request.q);
      },
      load: (ids, trx) => Account.query(trx).findByIds([...ids]),
    },
    knex,
  );
}
