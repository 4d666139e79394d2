import type { Router } from 'express';
import * as contract from '#contract/facts.ts';
import { presentPage } from '#server/presenters/common.ts';
import { presentFactHistory, presentFactToChoose } from '#server/presenters/fact.ts';
import { bringBack } from '#server/services/facts/bring-back.ts';
import { flagFact } from '#server/services/facts/flag-fact.ts';
import { listAccounts } from '#server/services/facts/list-accounts.ts';
import { listFacts } from '#server/services/facts/list-facts.ts';
import { markRegistersReading } from '#server/services/facts/mark-registers-reading.ts';
import { readFactHistory } from '#server/services/facts/read-fact-history.ts';
import { retireFact } from '#server/services/facts/retire-fact.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { serve } from '../serve.ts';

/** Facts of every kind by id. */
export function mountFacts(router: Router, { knex }: ApiDependencies): void {
  serve(router, contract.listFacts, async ({ query }) => presentPage(await listFacts(query, knex), presentFactToChoose));
  serve(router, contract.listAccounts, async ({ query }) => presentPage(await listAccounts(query, knex), ({ id, title }) => ({ id, title })));
  serve(router, contract.readFactHistory, async ({ params }, { viewer }) => presentFactHistory(await readFactHistory(viewer, params.id, knex)));
  serve(router, contract.bringBack, async ({ params, body }, context) => presentFactHistory(await bringBack(params.id, body, context, knex)));
  serve(router, contract.retireFact, async ({ params, body }, context) => presentFactHistory(await retireFact(params.id, body, context, knex)));
  serve(router, contract.flagFact, async ({ params, body }, context) => ({ id: await flagFact(params.id, body.reason, context, knex) }));
  serve(router, contract.markRegistersReading, async ({ params, body }, context) => ({
    accountId: await markRegistersReading(params.id, body, context, knex),
  }));
}
