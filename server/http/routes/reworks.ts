import type { Router } from 'express';
import * as contract from '#contract/moderation.ts';
import { presentPage } from '#server/presenters/common.ts';
import { presentRework } from '#server/presenters/rework.ts';
import { listReworks } from '#server/services/reworks/list-reworks.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { serve } from '../serve.ts';

export function mountReworks(router: Router, { knex }: ApiDependencies): void {
  serve(router, contract.listReworks, async ({ query }, { viewer }) => presentPage(await listReworks(viewer, query, knex), presentRework));
}
