import type { Router } from 'express';
import * as contract from '#contract/sources.ts';
import { presentPage } from '#server/presenters/common.ts';
import { presentSourceHistory } from '#server/presenters/history.ts';
import { presentSource, presentSourceItem } from '#server/presenters/source.ts';
import { listSources } from '#server/services/list-sources.ts';
import { readSourceEntry } from '#server/services/read-history.ts';
import { readSource } from '#server/services/read-source.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { serve } from '../serve.ts';

export function mountSources(router: Router, { knex }: ApiDependencies): void {
  serve(router, contract.listSources, async ({ query }) => presentPage(await listSources(query, knex), presentSourceItem));
  serve(router, contract.readSource, async ({ params }) => presentSource(await readSource(params.slug, knex)));
  serve(router, contract.readSourceHistory, async ({ params }) => presentSourceHistory(await readSourceEntry(params.slug, knex)));
}
