import type { Knex } from 'knex';
import { afterAll, afterEach, beforeAll, describe, expect, test, vi } from 'vitest';
import { connect } from '#db/connection.ts';
import { enqueue } from '#server/queue/enqueue.ts';
import type { JobDefinition } from '#server/queue/job-definition.ts';
import { handle, startJobRunner } from '#server/queue/job-runner.ts';
import type { JobHandling, JobRunner } from '#server/queue/job-runner.ts';
import { sendMail } from '#server/queue/mail-jobs.ts';
import { useDatabase } from '#tests/support/database.ts';
import { clearJobs, jobsOf, makeDue } from '#tests/support/jobs.ts';
import { keptLog } from '#tests/support/log.ts';
import { startTcpProxy } from '#tests/support/tcp-proxy.ts';

const MESSAGE = { messageId: '01980000-0000-7000-8000-000000000001' };
const UNTIL = { timeout: 20_000, interval: 20 };

const database = useDatabase();
let knex: Knex;
const cleanUps: (() => Promise<unknown>)[] = [];
beforeAll(() => {
  knex = connect(database.url);
});
afterEach(async () => {
  for (const cleanUp of cleanUps.splice(0).toReversed()) await cleanUp();
  await clearJobs(knex);
});
afterAll(() => knex.destroy());

function run(handlings: readonly JobHandling[], url = database.url): JobRunner {
  const runner = startJobRunner({ url, handlings, logger: keptLog().logger, pollEvery: 20 });
  cleanUps.push(() => runner.stop());
  return runner;
}

function add(definition: JobDefinition<(typeof sendMail)['payload']> = sendMail): Promise<string> {
  return knex.transaction((trx) => enqueue(definition, MESSAGE, trx));
}

async function statesOf(queue: 'send-mail' | 'give-up-mail'): Promise<readonly string[]> {
  return (await jobsOf(queue, knex)).map(({ state }) => state);
}

describe('the runner', () => {
  test('performs each job once with its payload', async () => {
    const seen: unknown[] = [];
    run([
      handle(sendMail, (payload, { number }) => {
        seen.push([payload, number]);
        return Promise.resolve();
      }),
    ]);
    await add();
    await add();
    await vi.waitFor(async () => expect(await statesOf('send-mail')).toEqual(['completed', 'completed']), UNTIL);
    expect(seen).toEqual([
      [MESSAGE, 1],
      [MESSAGE, 1],
    ]);
  });

  test('tries again after a wait that doubles, and hands the payload on when every try failed', async () => {
    const numbers: number[] = [];
    const definition = { ...sendMail, retryLimit: 2, retryDelay: 60 } as const satisfies JobDefinition;
    run([
      handle(definition, (_payload, { number }) => {
        numbers.push(number);
        return Promise.reject(new Error('not today'));
      }),
    ]);
    await add(definition);

    await vi.waitFor(async () => expect(await statesOf('send-mail')).toEqual(['retry']), UNTIL);
    const [first] = await jobsOf('send-mail', knex);
    expect(first!.dueIn).toBeGreaterThan(55);
    expect(first!.dueIn).toBeLessThanOrEqual(120);

    await makeDue('send-mail', knex);
    await vi.waitFor(() => expect(numbers).toEqual([1, 2]), UNTIL);
    await vi.waitFor(async () => expect(await statesOf('send-mail')).toEqual(['retry']), UNTIL);
    const [second] = await jobsOf('send-mail', knex);
    expect(second!.dueIn).toBeGreaterThan(115);
    expect(second!.dueIn).toBeLessThanOrEqual(240);

    await makeDue('send-mail', knex);
    await vi.waitFor(async () => expect(await statesOf('send-mail')).toEqual(['failed']), UNTIL);
    expect(numbers).toEqual([1, 2, 3]);
    expect(await jobsOf('give-up-mail', knex)).toEqual([expect.objectContaining({ state: 'created', data: MESSAGE })]);
  });

  test('fails a job whose payload is not what its handler takes', async () => {
    let performed = 0;
    run([
      handle(sendMail, () => {
        performed += 1;
        return Promise.resolve();
      }),
    ]);
    await knex.transaction(async (trx) => {
      await enqueue(sendMail, MESSAGE, trx);
      await trx('pgboss.job').update({ data: '{"messageId": 7}' });
    });
    await vi.waitFor(async () => expect(await statesOf('send-mail')).toEqual(['retry']), UNTIL);
    expect(performed).toBe(0);
  });

  test('cuts a try whose time is up, and goes on with the next job', async () => {
    // A second more than the margin the runner keeps.
    const brief = { ...sendMail, expireInSeconds: 6 } as const satisfies JobDefinition;
    let begun = 0;
    let raised = false;
    run([
      handle(brief, (_payload, { signal }) => {
        begun += 1;
        if (begun > 1) return Promise.resolve();
        return new Promise(() => signal.addEventListener('abort', () => (raised = true)));
      }),
    ]);
    await add(brief);
    await vi.waitFor(() => expect(begun).toBe(1), UNTIL);
    await add(brief);
    await vi.waitFor(async () => expect((await statesOf('send-mail')).toSorted()).toEqual(['completed', 'retry']), UNTIL);
    expect(raised).toBe(true);
  });

  test('takes over a job whose worker died', async () => {
    await add();
    await knex('pgboss.job').update({ state: 'active', started_on: knex.raw(`now() - interval '10 minutes'`) });
    let performed = 0;
    run([
      handle(sendMail, () => {
        performed += 1;
        return Promise.resolve();
      }),
    ]);
    await vi.waitFor(async () => expect(await statesOf('send-mail')).toEqual(['retry']), UNTIL);
    await makeDue('send-mail', knex);
    await vi.waitFor(async () => expect(await statesOf('send-mail')).toEqual(['completed']), UNTIL);
    expect(performed).toBe(1);
  });

  test('lets a job under way finish before it stops, and takes no other', async () => {
    let release: (() => void) | undefined;
    let begun = 0;
    const runner = run([
      handle(sendMail, () => {
        begun += 1;
        return new Promise<void>((resolve) => {
          release = resolve;
        });
      }),
    ]);
    await add();
    await vi.waitFor(() => expect(begun).toBe(1), UNTIL);
    await add();
    const stopped = runner.stop();
    expect(runner.isAlive()).toBe(false);
    release?.();
    await stopped;
    cleanUps.length = 0;
    expect((await statesOf('send-mail')).toSorted()).toEqual(['completed', 'created']);
    expect(begun).toBe(1);
  });
});

describe('while the database is away', () => {
  async function runOverWire(handlings: readonly JobHandling[]): Promise<{ proxy: Awaited<ReturnType<typeof startTcpProxy>>; runner: JobRunner }> {
    const url = new URL(database.url);
    const proxy = await startTcpProxy({ host: url.hostname, port: Number(url.port || '5432') });
    cleanUps.push(proxy.cut);
    url.hostname = '127.0.0.1';
    url.port = String(proxy.port);
    return { proxy, runner: run(handlings, url.href) };
  }

  test('the runner waits, and performs afterwards what was enqueued meanwhile', async () => {
    let performed = 0;
    const { proxy, runner } = await runOverWire([
      handle(sendMail, () => {
        performed += 1;
        return Promise.resolve();
      }),
    ]);
    await vi.waitFor(() => expect(runner.isAlive()).toBe(true), UNTIL);
    await proxy.cut();
    await add();
    expect(performed).toBe(0);
    await proxy.mend();
    await vi.waitFor(async () => expect(await statesOf('send-mail')).toEqual(['completed']), UNTIL);
    expect(performed).toBe(1);
  });

  test('a job whose end cannot be noted stays with the queue, and the process lives on', async () => {
    const wire: { cut?: () => Promise<void> } = {};
    const { proxy, runner } = await runOverWire([
      handle(sendMail, async () => {
        await wire.cut?.();
      }),
    ]);
    wire.cut = async () => {
      delete wire.cut;
      await proxy.cut();
    };
    await add();
    await vi.waitFor(() => expect(wire.cut).toBeUndefined(), UNTIL);
    await proxy.mend();
    expect(await statesOf('send-mail')).toEqual(['active']);
    await add();
    await vi.waitFor(async () => expect((await statesOf('send-mail')).toSorted()).toEqual(['active', 'completed']), UNTIL);
    expect(runner.isAlive()).toBe(true);
  });

  test('a runner started then begins its work when the database is back', async () => {
    const url = new URL(database.url);
    const proxy = await startTcpProxy({ host: url.hostname, port: Number(url.port || '5432') });
    cleanUps.push(proxy.cut);
    await proxy.cut();
    url.hostname = '127.0.0.1';
    url.port = String(proxy.port);
    const runner = run([handle(sendMail, () => Promise.resolve())], url.href);
    expect(runner.isAlive()).toBe(false);
    await add();
    await proxy.mend();
    await vi.waitFor(async () => expect(await statesOf('send-mail')).toEqual(['completed']), UNTIL);
    expect(runner.isAlive()).toBe(true);
  });
});
