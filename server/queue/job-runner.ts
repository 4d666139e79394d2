import { setMaxListeners } from 'node:events';
import { setTimeout as wait } from 'node:timers/promises';
import PgBoss from 'pg-boss';
import type { Logger } from 'pino';
import type { z } from 'zod';
import { QUEUE_SCHEMA } from '#db/queues.ts';
import type { JobDefinition } from './job-definition.ts';
import { openQueueDatabase } from './queue-database.ts';

/** Milliseconds. */
const POLL = 1_000;
const TIDY = 30_000;
/** A queue that has not been asked for this long is not alive; one statement may take most of it. */
const SILENCE = 15_000;
/** Jobs under way are given this long once the server was asked to stop. */
const GRACE = 8_000;
/** A try is cut this long before the queue counts it as lost and hands the job to another. */
const MARGIN = 5_000;

/** One run of a job. */
export type Attempt = {
  /** 1 for the first. */
  readonly number: number;
  /** Raised when time is up or the server stops. A handler must let go of what it waits for. */
  readonly signal: AbortSignal;
};

/** A definition and what is done about it. A job may run again after it has done its work, so handlers do it at most once by themselves. */
export type JobHandling = {
  readonly definition: JobDefinition;
  /** Jobs of this queue that run at once in this process. */
  readonly lanes: number;
  readonly perform: (payload: unknown, attempt: Attempt) => Promise<void>;
};

export function handle<Payload extends z.ZodObject>(
  definition: JobDefinition<Payload>,
  perform: (payload: z.output<Payload>, attempt: Attempt) => Promise<void>,
  lanes = 1,
): JobHandling {
  return { definition, lanes, perform: (payload, attempt) => perform(definition.payload.parse(payload), attempt) };
}

export type JobRunner = {
  /** Whether the queue is being asked for work and answers. */
  readonly isAlive: () => boolean;
  /** Takes no more jobs, lets those under way finish for up to eight seconds, then cuts and hands back what is left. */
  readonly stop: () => Promise<void>;
};

type RunnerOptions = {
  readonly url: string;
  readonly handlings: readonly JobHandling[];
  readonly logger: Logger;
  /** Milliseconds between two looks at an empty queue. */
  readonly pollEvery?: number;
};

/**
 * Works the queues off, beside the requests of the same process. While the database is away nothing happens, and once it is back jobs go on.
 *
 * The package's own workers are not used: they report the end of a job without waiting for it, so that a connection lost at that moment
 * is a rejection nobody handles and ends the process.
 */
export function startJobRunner({ url, handlings, logger, pollEvery = POLL }: RunnerOptions): JobRunner {
  const database = openQueueDatabase(url, (error) => logger.warn({ err: error }, 'the queue lost a connection'));
  const boss = new PgBoss({ db: database, schema: QUEUE_SCHEMA, migrate: false, supervise: false, schedule: false });
  boss.on('error', (error) => logger.warn({ err: error }, 'the queue met an error'));
  const stopping = new AbortController();
  const cutting = new AbortController();
  // Every lane listens to both, and more than ten listeners are taken for a leak.
  setMaxListeners(0, stopping.signal, cutting.signal);

  const workOff = async (handling: JobHandling): Promise<void> => {
    const { name } = handling.definition;
    while (!stopping.signal.aborted) {
      // A statement that failed also finds nothing, and is tried again after the same pause.
      const [job] = await boss.fetch<unknown>(name, { includeMetadata: true });
      if (job) await run(handling, job);
      else await pause(pollEvery, stopping.signal);
    }
  };

  const run = async ({ definition, perform }: JobHandling, job: PgBoss.JobWithMetadata<unknown>): Promise<void> => {
    const { name, id } = job;
    const number = job.retryCount + 1;
    const signal = AbortSignal.any([AbortSignal.timeout(definition.expireInSeconds * 1_000 - MARGIN), cutting.signal]);
    try {
      await Promise.race([perform(job.data, { number, signal }), raised(signal)]);
    } catch (error) {
      logger.warn({ err: error, queue: name, job: id, attempt: number }, 'a job failed');
      await settle(() => boss.fail(name, id, { reason: error instanceof Error ? error.name : typeof error }), name, id);
      return;
    }
    await settle(() => boss.complete(name, id), name, id);
  };

  const settle = async (report: () => Promise<void>, queue: string, job: string): Promise<void> => {
    try {
      await report();
    } catch (error) {
      // The queue takes it for lost when its time is up and hands it out again, and the handler finds its work done.
      logger.warn({ err: error, queue, job }, 'the end of a job could not be noted');
    }
  };

  const tidy = async (): Promise<void> => {
    while (!stopping.signal.aborted) {
      try {
        await boss.maintain();
      } catch (error) {
        logger.warn({ err: error }, 'the queue could not be tidied');
      }
      await pause(TIDY, stopping.signal);
    }
  };

  const lanes = [...handlings.flatMap((handling) => Array.from({ length: handling.lanes }, () => workOff(handling))), tidy()];

  return {
    isAlive: () => !stopping.signal.aborted && database.silentFor() < SILENCE,
    stop: async () => {
      stopping.abort();
      const cut = setTimeout(() => cutting.abort(), GRACE);
      await Promise.all(lanes);
      clearTimeout(cut);
      await database.close();
    },
  };
}

async function pause(milliseconds: number, signal: AbortSignal): Promise<void> {
  await wait(milliseconds, undefined, { signal }).catch(() => undefined);
}

/** Rejects when the signal is raised; a handler that did not heed it is left to itself. */
function raised(signal: AbortSignal): Promise<never> {
  return new Promise((_resolve, reject) => {
    signal.addEventListener('abort', () => reject(new JobCutError()), { once: true });
  });
}

/** A job's time was up, or the server stopped. */
class JobCutError extends Error {
  constructor() {
    super('The job was cut: its time was up or the server stopped');
    this.name = 'JobCutError';
  }
}
