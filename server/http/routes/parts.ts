import type { Router } from 'express';
import * as contract from '#contract/parts.ts';
import { presentPage } from '#server/presenters/common.ts';
import { presentPart, presentPartItem } from '#server/presenters/part.ts';
import { changePart } from '#server/services/parts/change-part.ts';
import { listMyParts } from '#server/services/parts/list-my-parts.ts';
import { readPart } from '#server/services/parts/read-part.ts';
import { recordPart } from '#server/services/parts/record-part.ts';
import { removePart } from '#server/services/parts/remove-part.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { serve } from '../serve.ts';

/** A member's own parts, and public ones for everybody. */
export function mountParts(router: Router, { knex, ciphers }: ApiDependencies): void {
  serve(router, contract.listMyParts, async ({ query }, { viewer }) => presentPage(await listMyParts(viewer, query, knex), ({ inView }) => presentPartItem(inView)));
  serve(router, contract.recordPart, async ({ body }, context) => presentPart(await recordPart(body, context, ciphers, knex)));
  serve(router, contract.readPart, async ({ params }, { viewer }) => presentPart(await readPart(viewer, params.id, knex)));
  serve(router, contract.changePart, async ({ params, body }, context) => presentPart(await changePart(params.id, body, context, ciphers, knex)));
  serve(router, contract.removePart, async ({ params }, context) => {
    await removePart(params.id, context, knex);
    return { done: true as const };
  });
}
