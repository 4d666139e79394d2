import type { Router } from 'express';
import * as contract from '#contract/part-types.ts';
import { presentPage } from '#server/presenters/common.ts';
import { presentHistory } from '#server/presenters/history.ts';
import { presentPartType, presentPartTypeItem } from '#server/presenters/part-type.ts';
import { listPartTypes } from '#server/services/list-part-types.ts';
import { readHistory } from '#server/services/read-history.ts';
import { readPartType } from '#server/services/read-part-type.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { serve } from '../serve.ts';

export function mountPartTypes(router: Router, { knex }: ApiDependencies): void {
  serve(router, contract.listPartTypes, async ({ query }) => presentPage(await listPartTypes(query, knex), presentPartTypeItem));
  serve(router, contract.readPartType, async ({ params }) => presentPartType(await readPartType(params.slug, knex)));
  serve(router, contract.readPartTypeHistory, async ({ params }) => presentHistory(await readHistory('part-type', params.slug, knex)));
}
