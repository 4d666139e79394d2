import { setTimeout as wait } from 'node:timers/promises';
import type { Knex } from 'knex';
import type { Logger } from 'pino';
import { enqueue } from '#server/queue/enqueue.ts';
import { sweepPhotos } from '#server/queue/photo-jobs.ts';
import { forgetOldKeys } from '#server/services/only-once.ts';

/** Milliseconds. */
const HOUR = 60 * 60 * 1_000;

type Means = { readonly knex: Knex; readonly logger: Logger; readonly signal: AbortSignal };

/**
 * Has photos swept, and forgets the keys of old requests, when a server starts and every hour after. Several servers sweep more often, which does no
 * harm. What fails now is tried an hour later. Never rejects.
 */
export async function sweepHourly({ knex, logger, signal }: Means): Promise<void> {
  while (!signal.aborted) {
    try {
      await knex.transaction((trx) => enqueue(sweepPhotos, {}, trx));
      await forgetOldKeys(knex);
    } catch (error) {
      logger.warn({ err: error }, 'what is left over could not be swept now');
    }
    await wait(HOUR, undefined, { signal }).catch(() => undefined);
  }
}
