import type { Knex } from 'knex';
import PgBoss from 'pg-boss';
import type { z } from 'zod';
import { QUEUE_SCHEMA } from '#db/queues.ts';
import type { JobDefinition } from './job-definition.ts';

/** What Knex holds a transaction open on: the driver's own connection. */
type TransactionClient = {
  readonly acquireConnection: () => Promise<{ readonly query: (text: string, values: unknown[]) => Promise<{ rows: unknown[] }> }>;
};

/** Only words the queue's statements: each is run on the connection of the transaction that enqueues. */
const statements = new PgBoss({
  schema: QUEUE_SCHEMA,
  db: { executeSql: () => Promise.reject(new Error('A job is enqueued only in a transaction')) },
});

/**
 * Enqueues a job in the transaction of the act it follows from: it is there if and when that commits, and never otherwise.
 *
 * @returns the job's id
 * @throws ZodError for a payload that is not the definition's; Error when the queue was never made.
 */
export async function enqueue<Payload extends z.ZodObject>(
  definition: JobDefinition<Payload>,
  payload: z.input<Payload>,
  trx: Knex.Transaction,
): Promise<string> {
  const { name, retryLimit, retryDelay, expireInSeconds, deadLetter } = definition;
  const id = await statements.send(name, definition.payload.parse(payload), {
    retryLimit,
    retryDelay,
    retryBackoff: true,
    expireInSeconds,
    ...(deadLetter === undefined ? {} : { deadLetter }),
    db: onConnectionOf(trx),
  });
  // A queue that is missing takes a job without a word and loses it.
  if (id === null) throw new Error(`There is no queue named ${name}: the database was not migrated by this version`);
  return id;
}

/** The statements number their parameters and use some twice, which Knex's own bindings can't say. */
function onConnectionOf(trx: Knex.Transaction): PgBoss.Db {
  return {
    executeSql: async (text, values) => {
      if (trx.isCompleted()) throw new Error('The transaction has ended: nothing can be enqueued in it');
      const connection = await (trx.client as TransactionClient).acquireConnection();
      return connection.query(text, values);
    },
  };
}
