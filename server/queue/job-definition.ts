import type { z } from 'zod';
import type { QueueName } from '#db/queues.ts';

/** What both ends of a queue agree on: whoever enqueues a job, and the handler in `server/jobs`. */
export type JobDefinition<Payload extends z.ZodObject = z.ZodObject> = {
  readonly name: QueueName;
  readonly payload: Payload;
  /** Tries after the first. */
  readonly retryLimit: number;
  /** Seconds before the second try; each later wait is about twice the one before it. */
  readonly retryDelay: number;
  /** Seconds one try may take. */
  readonly expireInSeconds: number;
  /** The queue that is handed the payload once every try has failed. */
  readonly deadLetter?: QueueName;
};
