import type { Router } from 'express';
import * as contract from '#contract/models.ts';
import { presentBuild } from '#server/presenters/build.ts';
import { presentPage } from '#server/presenters/common.ts';
import { presentHistory } from '#server/presenters/history.ts';
import { presentModel, presentModelItem } from '#server/presenters/model.ts';
import { listModels } from '#server/services/list-models.ts';
import { placeMachine } from '#server/services/place-machine.ts';
import { readHistory } from '#server/services/read-history.ts';
import { readModel } from '#server/services/read-model.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { serve } from '../serve.ts';

export function mountModels(router: Router, { knex }: ApiDependencies): void {
  serve(router, contract.listModels, async ({ query }) => presentPage(await listModels(query, knex), presentModelItem));
  serve(router, contract.readModel, async ({ params }) => presentModel(await readModel(params.slug, knex)));
  serve(router, contract.readModelHistory, async ({ params }) => presentHistory(await readHistory('model', params.slug, knex)));
  serve(router, contract.readBuild, async ({ params, query }) =>
    presentBuild(await placeMachine({ slug: params.slug, serial: query.serial }, knex)),
  );
}
