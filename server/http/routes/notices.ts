import type { Router } from 'express';
import * as contract from '#contract/notices.ts';
import { signedIn } from '#server/policies/viewer.ts';
import { presentPage } from '#server/presenters/common.ts';
import { presentNotice } from '#server/presenters/notice.ts';
import { listNotices } from '#server/services/notices/list-notices.ts';
import { markNoticesRead } from '#server/services/notices/mark-notices-read.ts';
import { chooseNotices, readNoticeChoices } from '#server/services/notices/notice-choices.ts';
import { unsubscribe } from '#server/services/notices/unsubscribe.ts';
import { withTransaction } from '#server/services/transaction.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { serve } from '../serve.ts';

/** A member's own notices. Another's are not there: no query looks beyond the member who asks. */
export function mountNotices(router: Router, { knex }: ApiDependencies): void {
  serve(router, contract.listNotices, async ({ query: { unread, ...query } }, { viewer }) => {
    const only = unread === undefined ? undefined : unread === 'true';
    return presentPage(await listNotices(signedIn(viewer).id, { ...query, unread: only }, knex), presentNotice);
  });
  serve(router, contract.markNoticesRead, async ({ body }, { viewer }) => ({
    unread: await markNoticesRead(signedIn(viewer).id, body.ids, knex),
  }));
  serve(router, contract.readNoticeChoices, async (_input, { viewer }) => ({ byEmail: await readNoticeChoices(signedIn(viewer).id, knex) }));
  serve(router, contract.chooseNotices, async ({ body }, { viewer }) => {
    const { id } = signedIn(viewer);
    return { byEmail: await withTransaction(knex, (trx) => chooseNotices(id, body.byEmail, trx), { actorId: id }) };
  });
  serve(router, contract.unsubscribe, async ({ params }) => ({ kind: await unsubscribe(params.token, knex) }));
}
