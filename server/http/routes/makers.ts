import type { Router } from 'express';
import * as contract from '#contract/makers.ts';
import { presentPage } from '#server/presenters/common.ts';
import { presentHistory } from '#server/presenters/history.ts';
import { presentMaker, presentMakerItem } from '#server/presenters/maker.ts';
import { listMakers } from '#server/services/list-makers.ts';
import { readHistory } from '#server/services/read-history.ts';
import { readMaker } from '#server/services/read-maker.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { serve } from '../serve.ts';

export function mountMakers(router: Router, { knex }: ApiDependencies): void {
  serve(router, contract.listMakers, async ({ query }) => presentPage(await listMakers(query, knex), presentMakerItem));
  serve(router, contract.readMaker, async ({ params }) => presentMaker(await readMaker(params.slug, knex)));
  serve(router, contract.readMakerHistory, async ({ params }) => presentHistory(await readHistory('maker', params.slug, knex)));
}
