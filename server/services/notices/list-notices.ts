import type { Knex } from 'knex';
import { Notice } from '#db/models/notice.ts';
import { listPage } from '#server/services/list-page.ts';
import type { ListRequest, Order, Page } from '#server/services/list-page.ts';
import { matchText } from '#server/services/search.ts';

const ORDERS = {
  '-at': { keys: [{ column: 'notices.at', as: 'instant' }], direction: 'desc' },
} as const satisfies Record<string, Order>;

export type NoticeListing = ListRequest<keyof typeof ORDERS> & {
  readonly q?: string | undefined;
  /** Only those not read yet, or only those read. */
  readonly unread?: boolean | undefined;
};

/** A member's own notices and nobody else's. */
export async function listNotices(memberId: string, request: NoticeListing, knex: Knex): Promise<Page<Notice>> {
  return listPage(
    {
      table: 'notices',
      orders: ORDERS,
      request,
      filter: (query) => {
        const { q, unread } = request;
        void query.where({ memberId });
        if (unread === true) void query.whereNull('readAt');
        if (unread === false) void query.whereNotNull('readAt');
        if (q) matchText(query, ['title', 'body'], q);
      },
      load: (ids, trx) => Notice.query(trx).findByIds([...ids]),
    },
    knex,
  );
}
