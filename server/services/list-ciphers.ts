import type { Knex } from 'knex';
import { Cipher } from '#db/models/cipher.ts';
import { listPage } from './list-page.ts';
import type { ListRequest, Order, Page } from './list-page.ts';
import { matchText } from './search.ts';

const TITLE = { column: 'ciphers.title', as: 'text' } as const;
const ORDERS = {
  title: { keys: [TITLE], direction: 'asc' },
  '-title': { keys: [TITLE], direction: 'desc' },
  used: { keys: [{ column: 'cipher_versions.used', as: 'first-day' }, TITLE], direction: 'asc' },
} as const satisfies Record<string, Order>;

export type CipherListing = ListRequest<keyof typeof ORDERS> & { readonly q?: string | undefined; readonly maker?: string | undefined };

export async function listCiphers(request: CipherListing, knex: Knex): Promise<Page<Cipher>> {
  return listPage(
    {
      table: 'ciphers',
      orders: ORDERS,
      request,
      filter: (query) => {
        const { q, maker } = request;
        void query
          .join('cipher_versions', 'cipher_versions.cipherId', 'ciphers.id')
          .whereNull('cipher_versions.supersededAt')
          .join('makers', 'makers.id', 'ciphers.makerId')
          .leftJoin({ foundries: 'makers' }, 'foundries.id', 'ciphers.foundryId');
        if (maker) void query.whereRaw('? in (makers.slug, foundries.slug)', [maker]);
        if (q) matchText(query, ['ciphers.title', 'makers.name'], q);
      },
      load: (ids, trx) => Cipher.query(trx).findByIds([...ids]).withGraphFetched('[maker, foundry, versionInForce]'),
    },
    knex,
  );
}
