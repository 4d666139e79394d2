import { setTimeout as wait } from 'node:timers/promises';
import type { Knex } from 'knex';
import type { Logger } from 'pino';
import { resumeReworks } from '#server/services/reworks/resume-reworks.ts';

/** Milliseconds between two tries while the database is away. */
const PAUSE = 5_000;

type Means = { readonly knex: Knex; readonly logger: Logger; readonly signal: AbortSignal };

/** Once, when a server starts: takes up the reworks that are not done, as soon as the database answers. Never rejects. */
export async function takeUpReworks({ knex, logger, signal }: Means): Promise<void> {
  while (!signal.aborted) {
    try {
      const count = await resumeReworks(knex);
      if (count > 0) logger.info({ count }, 'unfinished reworks taken up');
      return;
    } catch (error) {
      logger.warn({ err: error }, 'unfinished reworks could not be taken up yet');
      await wait(PAUSE, undefined, { signal }).catch(() => undefined);
    }
  }
}
