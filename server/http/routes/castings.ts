import type { Router } from 'express';
import * as contract from '#contract/castings.ts';
import { presentCasting, presentCastingItem } from '#server/presenters/casting.ts';
import { presentPage } from '#server/presenters/common.ts';
import { presentHistory } from '#server/presenters/history.ts';
import { listCastings } from '#server/services/list-castings.ts';
import { readCasting } from '#server/services/read-casting.ts';
import { readHistory } from '#server/services/read-history.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { serve } from '../serve.ts';

export function mountCastings(router: Router, { knex }: ApiDependencies): void {
  serve(router, contract.listCastings, async ({ query }) => presentPage(await listCastings(query, knex), presentCastingItem));
  serve(router, contract.readCasting, async ({ params }) => presentCasting(await readCasting(params.slug, knex)));
  serve(router, contract.readCastingHistory, async ({ params }) => presentHistory(await readHistory('casting', params.slug, knex)));
}
