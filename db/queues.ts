import PgBoss from 'pg-boss';

/** The schema the job queue keeps its own tables in. */
export const QUEUE_SCHEMA = 'pgboss';

/** Every queue there is. One that is not made can't be sent to, so all are made with the database. */
export const QUEUE_NAMES = ['send-mail', 'give-up-mail', 'run-rework', 'give-up-rework', 'make-renditions', 'give-up-renditions', 'sweep-photos'] as const;
export type QueueName = (typeof QUEUE_NAMES)[number];

/**
 * Brings the queue's tables up to the version this server was written for and makes the queues that are missing. Safe to run again, and
 * by two at once.
 */
export async function installQueues(url: string): Promise<void> {
  const boss = new PgBoss({ connectionString: url, schema: QUEUE_SCHEMA, max: 1, supervise: false, schedule: false });
  const failures: Error[] = [];
  // An error that nobody listens for would end the process.
  boss.on('error', (error) => failures.push(error));
  await boss.start();
  try {
    for (const name of QUEUE_NAMES) await boss.createQueue(name);
  } finally {
    await boss.stop({ graceful: false });
  }
  if (failures.length > 0) throw new AggregateError(failures, 'The job queue could not be made ready');
}
