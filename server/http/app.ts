import compression from 'compression';
import express from 'express';
import type { Express } from 'express';
import type { Knex } from 'knex';
import type { Logger } from 'pino';
import type { Day } from '#domain/dates/day.ts';
import type { Config } from '#server/config.ts';
import type { PhotoMeans } from '#server/files/photo-means.ts';
import type { JobRunner } from '#server/queue/job-runner.ts';
import { createCipherCache } from '#server/services/cipher-cache.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { identify } from './auth/identify.ts';
import { sessionCookie } from './auth/session-cookie.ts';
import { logRequests } from './logging.ts';
import { answerProblems } from './middleware/answer-problems.ts';
import { hangUpOnRefusal } from './middleware/hang-up-on-refusal.ts';
import { refuseForgery } from './middleware/refuse-forgery.ts';
import { refuseMalformedTarget } from './middleware/refuse-malformed-target.ts';
import { securityHeaders } from './middleware/security-headers.ts';
import { mountApi } from './routes/api.ts';
import { mountClient } from './routes/client.ts';
import { mountHealth } from './routes/health.ts';
import { mountOneClick } from './routes/one-click.ts';
import { mountPhotoFiles } from './routes/photo-files.ts';

export type AppDependencies = {
  readonly knex: Knex;
  readonly config: Pick<Config, 'environment' | 'publicOrigin' | 'trustProxy' | 'clientDirectory' | 'localPostDirectory'>;
  readonly logger: Logger;
  /** Today's calendar day, UTC. */
  readonly clock: () => Day;
  readonly jobs: Pick<JobRunner, 'isAlive'>;
  readonly photos: PhotoMeans;
};

/** The whole HTTP side as one value: nothing listens and nothing connects until a request comes. */
export function createApp({ knex, config, logger, clock, jobs, photos }: AppDependencies): Express {
  const ciphers = createCipherCache({ onUnusable: (key, faults) => logger.error({ ...key, faults }, 'stored cipher does not compile') });
  const app = express();
  app.set('trust proxy', [...config.trustProxy]);
  app.set('query parser', 'simple');

  app.use(logRequests(logger));
  app.use(securityHeaders(config.publicOrigin));
  app.use(refuseMalformedTarget);
  app.use(compression());

  mountHealth(app, { knex, jobs, store: photos.store });
  const whoIsAsking = identify(knex, sessionCookie(config));
  // Before anything may refuse an upload: what is left of it is not waited for.
  app.use('/api/photos', hangUpOnRefusal);
  app.use(
    '/api',
    refuseForgery(config.publicOrigin),
    whoIsAsking,
    mountApi({
      knex,
      clock,
      ciphers,
      photos,
      publicOrigin: config.publicOrigin,
      demoSignIns: config.environment !== 'production',
      localPostDirectory: config.environment === 'production' ? undefined : config.localPostDirectory,
    }),
  );
  app.use('/photos', whoIsAsking, mountPhotoFiles({ knex, photos }));
  mountOneClick(app, knex);
  mountClient(app, config.clientDirectory);
  app.use(() => {
    throw new ProblemError('not-found', 'There is nothing at this address.');
  });
  app.use(answerProblems);
  return app;
}
