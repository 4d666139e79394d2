import { setTimeout as wait } from 'node:timers/promises';
import type { Knex } from 'knex';
import type { Logger } from 'pino';
import { resumeRenditions } from '#server/services/photos/resume-renditions.ts';

/** Milliseconds between two tries while the database is away. */
const PAUSE = 5_000;

type Means = { readonly knex: Knex; readonly logger: Logger; readonly signal: AbortSignal };

/** Once, when a server starts: takes up the pictures whose renditions are to be made, as soon as the database answers. Never rejects. */
export async function takeUpRenditions({ knex, logger, signal }: Means): Promise<void> {
  while (!signal.aborted) {
    try {
      const count = await resumeRenditions(knex);
      if (count > 0) logger.info({ count }, 'waiting pictures taken up');
      return;
    } catch (error) {
      logger.warn({ err: error }, 'waiting pictures could not be taken up yet');
      await wait(PAUSE, undefined, { signal }).catch(() => undefined);
    }
  }
}
