import type { Knex } from 'knex';
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import { ZodError } from 'zod';
import { connect } from '#db/connection.ts';
import { enqueue } from '#server/queue/enqueue.ts';
import type { JobDefinition } from '#server/queue/job-definition.ts';
import { sendMail } from '#server/queue/mail-jobs.ts';
import { useDatabase } from '#tests/support/database.ts';
import { clearJobs, jobsOf } from '#tests/support/jobs.ts';

const MESSAGE = { messageId: '01980000-0000-7000-8000-000000000001' };

const database = useDatabase();
let knex: Knex;
beforeAll(() => {
  knex = connect(database.url);
});
afterEach(() => clearJobs(knex));
afterAll(() => knex.destroy());

describe('a job', () => {
  test('is there once its transaction commits, with the tries its definition allows', async () => {
    const id = await knex.transaction(async (trx) => {
      const job = await enqueue(sendMail, MESSAGE, trx);
      expect(await jobsOf('send-mail', knex)).toEqual([]);
      return job;
    });
    expect(await jobsOf('send-mail', knex)).toEqual([expect.objectContaining({ id, state: 'created', data: MESSAGE, retryCount: 0 })]);
    const row: unknown = await knex('pgboss.job').first('retryLimit', 'retryDelay', 'retryBackoff', 'deadLetter', knex.raw('expire_in::text as expire'));
    expect(row).toEqual({ retryLimit: 10, retryDelay: 30, retryBackoff: true, deadLetter: 'give-up-mail', expire: '00:01:30' });
  });

  test('was never there when its transaction rolls back', async () => {
    const failed = knex.transaction(async (trx) => {
      await enqueue(sendMail, MESSAGE, trx);
      throw new Error('changed our mind');
    });
    await expect(failed).rejects.toThrow('changed our mind');
    expect(await jobsOf('send-mail', knex)).toEqual([]);
  });

  test('goes with the savepoint it was enqueued in', async () => {
    await knex.transaction(async (trx) => {
      const inner = trx.transaction(async (savepoint) => {
        await enqueue(sendMail, MESSAGE, savepoint);
        throw new Error('not this part');
      });
      await expect(inner).rejects.toThrow('not this part');
    });
    expect(await jobsOf('send-mail', knex)).toEqual([]);
  });

  test('cannot be enqueued in a transaction that has ended', async () => {
    const trx = await knex.transaction();
    await trx.commit();
    await expect(enqueue(sendMail, MESSAGE, trx)).rejects.toThrow('has ended');
  });

  test('with a payload of another shape is refused', async () => {
    const refused = knex.transaction((trx) => enqueue(sendMail, { messageId: 'the first one' }, trx));
    await expect(refused).rejects.toThrow(ZodError);
  });

  test('for a queue nobody made is an error instead of being lost', async () => {
    const trx = await knex.transaction();
    try {
      await trx.raw(`select pgboss.delete_queue('give-up-mail')`);
      const unmade = { ...sendMail, name: 'give-up-mail', deadLetter: 'send-mail' } as const satisfies JobDefinition;
      await expect(enqueue(unmade, MESSAGE, trx)).rejects.toThrow('There is no queue named give-up-mail');
    } finally {
      await trx.rollback();
    }
  });
});
