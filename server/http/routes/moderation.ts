import type { Router } from 'express';
import * as contract from '#contract/moderation.ts';
import { presentPage } from '#server/presenters/common.ts';
import { presentFlag, presentQueueItem } from '#server/presenters/queue.ts';
import { listQueue } from '#server/services/moderation/list-queue.ts';
import { settleFlag } from '#server/services/moderation/settle-flag.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { serve } from '../serve.ts';

/** What waits for moderators. */
export function mountModeration(router: Router, { knex }: ApiDependencies): void {
  serve(router, contract.listQueue, async ({ query }, { viewer }) => presentPage(await listQueue(viewer, query, knex), presentQueueItem));
  serve(router, contract.settleFlag, async ({ params, body }, context) => presentFlag(await settleFlag(params.id, body, context, knex)));
}
