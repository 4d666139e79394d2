import type { Knex } from 'knex';
import { z } from 'zod';
import type { QueueName } from '#db/queues.ts';

const Job = z.object({
  id: z.string(),
  state: z.enum(['created', 'retry', 'active', 'completed', 'cancelled', 'failed']),
  data: z.unknown(),
  retryCount: z.number(),
  /** Seconds from now until it may run; negative when it might already. */
  dueIn: z.number(),
});
export type Job = z.infer<typeof Job>;

/** The jobs of one queue, the oldest first. */
export async function jobsOf(queue: QueueName, knex: Knex): Promise<readonly Job[]> {
  const rows: unknown = await knex('pgboss.job')
    .where({ name: queue })
    .orderBy(['created_on', 'id'])
    .select('id', 'state', 'data', 'retry_count', knex.raw('extract(epoch from start_after - now()) as due_in'));
  return z.array(Job).parse(rows);
}

/** What a clock would do: jobs that wait for their next try may run now. */
export async function makeDue(queue: QueueName, knex: Knex): Promise<void> {
  await knex('pgboss.job').where({ name: queue, state: 'retry' }).update({ start_after: knex.raw(`now() - interval '1 second'`) });
}

/** Takes away every job there is, so that the next test starts with none. */
export async function clearJobs(knex: Knex): Promise<void> {
  await knex('pgboss.job').delete();
}
