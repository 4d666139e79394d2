import type { Router } from 'express';
import * as contract from '#contract/contributions.ts';
import { presentPage } from '#server/presenters/common.ts';
import { presentContribution, presentContributionItem, presentContributor, presentEvidence } from '#server/presenters/contribution.ts';
import { presentPerson } from '#server/presenters/fact.ts';
import { commentOnContribution } from '#server/services/contributions/comment-on-contribution.ts';
import { contributionPage } from '#server/services/contributions/contribution-page.ts';
import { decideContribution } from '#server/services/contributions/decide-contribution.ts';
import { discardContribution } from '#server/services/contributions/discard-contribution.ts';
import { gatherEvidence, readEvidence } from '#server/services/contributions/evidence.ts';
import { listMyContributions } from '#server/services/contributions/list-my-contributions.ts';
import { openContribution } from '#server/services/contributions/open-contribution.ts';
import { putForward } from '#server/services/contributions/put-forward.ts';
import { readContributor } from '#server/services/contributions/read-contributor.ts';
import { saveContribution } from '#server/services/contributions/save-contribution.ts';
import { startContribution } from '#server/services/contributions/start-contribution.ts';
import { withdrawContribution } from '#server/services/contributions/withdraw-contribution.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { serve } from '../serve.ts';

/** From the first draft to what became of it. */
export function mountContributions(router: Router, { knex }: ApiDependencies): void {
  serve(router, contract.startContribution, async ({ body }, context) => presentContribution(await startContribution(body, context, knex)));
  serve(router, contract.saveContribution, async ({ params, body }, context) => presentContribution(await saveContribution(params.id, body, context, knex)));
  serve(router, contract.readContribution, async ({ params }, { viewer }) => presentContribution(await contributionPage(viewer, params.id, knex)));
  serve(router, contract.discardContribution, async ({ params }, context) => {
    await discardContribution(params.id, context, knex);
    return { done: true as const };
  });

  serve(router, contract.putForward, async ({ params, body }, context) => presentContribution(await putForward(params.id, body.revision, context, knex)));
  serve(router, contract.withdrawContribution, async ({ params, body }, context) =>
    presentContribution(await withdrawContribution(params.id, body.revision, context, knex)),
  );
  serve(router, contract.commentOnContribution, async ({ params, body }, context) =>
    presentContribution(await commentOnContribution(params.id, body, context, knex)),
  );

  serve(router, contract.readEvidence, async ({ params }, { viewer }) => ({ items: (await readEvidence(viewer, params.id, knex)).map(presentEvidence) }));
  serve(router, contract.gatherEvidence, async ({ params }, context) => ({ items: (await gatherEvidence(params.id, context, knex)).map(presentEvidence) }));
  serve(router, contract.openContribution, async ({ params }, context) => ({ openWith: (await openContribution(params.id, context, knex)).map(presentPerson) }));
  serve(router, contract.decideContribution, async ({ params, body }, context) =>
    presentContribution(await decideContribution(params.id, body, context, knex)),
  );

  serve(router, contract.listMyContributions, async ({ query }, { viewer }) =>
    presentPage(await listMyContributions(viewer, query, knex), presentContributionItem),
  );
  serve(router, contract.readContributor, async ({ params, query }, { viewer }) =>
    presentContributor(await readContributor(viewer, params.id, query, knex)),
  );
}
