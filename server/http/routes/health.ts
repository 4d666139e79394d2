import type { Express } from 'express';
import type { Knex } from 'knex';
import type { PhotoStore } from '#server/files/photo-store.ts';
import type { JobRunner } from '#server/queue/job-runner.ts';
import { checkReadiness } from '#server/services/check-readiness.ts';

type Means = { readonly knex: Knex; readonly jobs: Pick<JobRunner, 'isAlive'>; readonly store: Pick<PhotoStore, 'isWritable'> };

/** `/healthz`: the process answers. `/readyz`: it can do its work, or why not, as a problem. */
export function mountHealth(app: Express, means: Means): void {
  app.get('/healthz', (_request, response) => {
    response.set('Cache-Control', 'no-store').json({ status: 'alive' });
  });
  app.get('/readyz', async (_request, response) => {
    await checkReadiness(means);
    response.set('Cache-Control', 'no-store').json({ status: 'ready', database: 'reachable', migrations: 'current', queue: 'alive', photos: 'writable' });
  });
}
