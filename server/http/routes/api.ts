import { Router } from 'express';
import { ENDPOINTS } from '#contract/endpoints.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { describeApi } from '../open-api.ts';
import type { ApiDescription } from '../open-api.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { mountAccounts } from './accounts.ts';
import { mountCastings } from './castings.ts';
import { mountCipherWorkbench } from './cipher-workbench.ts';
import { mountCiphers } from './ciphers.ts';
import { mountContributions } from './contributions.ts';
import { mountDecode } from './decode.ts';
import { mountFacts } from './facts.ts';
import { mountFit } from './fit.ts';
import { mountMakers } from './makers.ts';
import { mountMarks } from './marks.ts';
import { mountMembers } from './members.ts';
import { mountModels } from './models.ts';
import { mountModeration } from './moderation.ts';
import { mountNotices } from './notices.ts';
import { mountPartTypes } from './part-types.ts';
import { mountParts } from './parts.ts';
import { mountPhotos } from './photos.ts';
import { mountPost } from './post.ts';
import { mountReworks } from './reworks.ts';
import { mountSecondFactors } from './second-factors.ts';
import { mountSerialRanges } from './serial-ranges.ts';
import { mountSources } from './sources.ts';

/** Everything under `/api`. What is not there is a problem in JSON, never a page. */
export function mountApi(dependencies: ApiDependencies): Router {
  const router = Router({ strict: true });
  mountDecode(router, dependencies);
  mountFit(router);
  mountMakers(router, dependencies);
  mountModels(router, dependencies);
  mountPartTypes(router, dependencies);
  mountCastings(router, dependencies);
  mountCiphers(router, dependencies);
  mountCipherWorkbench(router, dependencies);
  mountParts(router, dependencies);
  mountMarks(router, dependencies);
  mountPhotos(router, dependencies);
  mountReworks(router, dependencies);
  mountSerialRanges(router, dependencies);
  mountSources(router, dependencies);
  mountAccounts(router, dependencies);
  mountSecondFactors(router, dependencies);
  mountNotices(router, dependencies);
  mountMembers(router, dependencies);
  mountContributions(router, dependencies);
  mountFacts(router, dependencies);
  mountModeration(router, dependencies);
  if (dependencies.localPostDirectory !== undefined) mountPost(router, dependencies.localPostDirectory);

  let description: ApiDescription | undefined;
  router.get('/openapi.json', (_request, response) => {
    description ??= describeApi(ENDPOINTS);
    response.set('Cache-Control', 'no-cache').json(description);
  });

  refuseOtherMethods(router);
  router.use(() => {
    throw new ProblemError('not-found', 'There is nothing at this address.');
  });
  return router;
}

/** After all routes: a path that is known, asked with a method that is not. */
function refuseOtherMethods(router: Router): void {
  const endpoints = Object.values(ENDPOINTS);
  for (const path of new Set(endpoints.map((one) => one.path))) {
    const methods = endpoints.filter((one) => one.path === path).map(({ method }) => method);
    const allowed = (methods.includes('GET') ? [...methods, 'HEAD'] : methods).join(', ');
    router.all(path, (request, response) => {
      response.set('Allow', allowed);
      throw new ProblemError('method-not-allowed', `${request.method} is not taken here, only ${allowed}.`);
    });
  }
}
