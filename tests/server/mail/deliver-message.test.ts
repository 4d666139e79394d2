import type { Knex } from 'knex';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, test, vi } from 'vitest';
import { connect } from '#db/connection.ts';
import { MailMessage } from '#db/models/mail-message.ts';
import { Member } from '#db/models/member.ts';
import { mailHandlings } from '#server/jobs/mail-handlings.ts';
import { eraseMailOf } from '#server/mail/erase-mail-of.ts';
import { createMailer } from '#server/mail/mailer.ts';
import { queueMail } from '#server/mail/queue-mail.ts';
import { startJobRunner } from '#server/queue/job-runner.ts';
import { useDatabase } from '#tests/support/database.ts';
import { clearJobs, jobsOf, makeDue } from '#tests/support/jobs.ts';
import { keptLog } from '#tests/support/log.ts';
import { startMailServer } from '#tests/support/mail-server.ts';
import type { MailServer } from '#tests/support/mail-server.ts';
import { startTcpProxy } from '#tests/support/tcp-proxy.ts';

const TO = 'b@register.example';
const TOKEN = 'Zm9yLXRlc3RzLW9ubHktMzItYnl0ZXMtb2Ytbm90aGk';
const UNTIL = { timeout: 20_000, interval: 20 };

const database = useDatabase();
let knex: Knex;
let memberId: string;
let server: MailServer;
const cleanUps: (() => Promise<unknown>)[] = [];

beforeAll(async () => {
  knex = connect(database.url);
  memberId = (await Member.query(knex).orderBy('id').first().throwIfNotFound()).id;
});
beforeEach(async () => {
  server = await startMailServer();
});
afterEach(async () => {
  for (const cleanUp of cleanUps.splice(0).toReversed()) await cleanUp();
  await server.stop();
  await clearJobs(knex);
  await MailMessage.query(knex).delete();
});
afterAll(() => knex.destroy());

/** Works jobs off as the server does, over a database of this address. */
function runJobs({ url = database.url, over = knex }: { readonly url?: string; readonly over?: Knex } = {}): void {
  const mailer = createMailer(
    { url: server.url, from: 'post@register.example', origin: 'https://register.example' },
    { connectionTimeout: 300, greetingTimeout: 300, socketTimeout: 1_000 },
  );
  const runner = startJobRunner({ url, handlings: mailHandlings({ knex: over, mailer }), logger: keptLog().logger, pollEvery: 20 });
  cleanUps.push(() => runner.stop());
}

async function queueOne(): Promise<void> {
  await knex.transaction((trx) => queueMail({ to: TO, template: 'confirm-address', data: { token: TOKEN }, memberId }, trx));
}

async function theMessage(): Promise<MailMessage> {
  return MailMessage.query(knex).first().throwIfNotFound();
}

async function untilMessage(expected: Partial<Record<keyof MailMessage, unknown>>): Promise<MailMessage> {
  await vi.waitFor(async () => expect(await theMessage()).toMatchObject(expected), UNTIL);
  return theMessage();
}

async function untilJobs(states: readonly string[]): Promise<void> {
  await vi.waitFor(async () => expect((await jobsOf('send-mail', knex)).map(({ state }) => state)).toEqual(states), UNTIL);
}

describe('a letter', () => {
  test('is sent once after the commit, and what it said is forgotten', async () => {
    runJobs();
    await queueOne();
    const message = await untilMessage({ state: 'sent' });
    await untilJobs(['completed']);
    expect(message).toMatchObject({ toAddress: TO, data: null, attempts: 1, lastError: null, leasedUntil: null });
    expect(message.settledAt).not.toBeNull();
    expect(server.taken).toHaveLength(1);
    expect(server.taken[0]).toMatchObject({ to: [TO], mail: { messageId: `<${message.id}@register.example>` } });
  });

  test('to an address of no account keeps no address once it is sent', async () => {
    runJobs();
    await knex.transaction((trx) => queueMail({ to: TO, template: 'already-known', data: {} }, trx));
    await untilMessage({ state: 'sent', toAddress: null });
    expect(server.taken.map(({ to }) => to)).toEqual([[TO]]);
  });

  test.each(['hang-up', 'later', 'never-from-us', 'hang-at-greeting', 'hang-at-end'] as const)(
    'waits for a mail server in trouble (%s), and is sent once when it is well again',
    async (manners) => {
      server.behave(manners);
      runJobs();
      await queueOne();
      const waiting = await untilMessage({ state: 'queued', attempts: 1, leasedUntil: null, lastError: expect.any(String) as string });
      expect(waiting.lastError).not.toContain(TO);
      await untilJobs(['retry']);
      const [job] = await jobsOf('send-mail', knex);
      expect(job!.dueIn).toBeGreaterThan(25);
      expect(job!.dueIn).toBeLessThanOrEqual(60);

      await makeDue('send-mail', knex);
      await untilMessage({ state: 'queued', attempts: 2, leasedUntil: null });
      await untilJobs(['retry']);
      expect(server.taken).toEqual([]);

      server.behave('take');
      await makeDue('send-mail', knex);
      await untilMessage({ state: 'sent', attempts: 3, lastError: null });
      await untilJobs(['completed']);
      expect(server.taken).toHaveLength(1);
    },
  );

  test('that the server refuses for good is given up at once', async () => {
    server.behave('never-to-them');
    runJobs();
    await queueOne();
    const message = await untilMessage({ state: 'failed', attempts: 1 });
    expect(message).toMatchObject({ data: null, lastError: 'EENVELOPE RCPT TO 550' });
    await untilJobs(['completed']);
    expect(server.calls()).toBe(1);
  });

  test('that no try brought through is given up in sight of all', async () => {
    server.behave('hang-up');
    await queueOne();
    await knex('pgboss.job').update({ retry_limit: 1 });
    runJobs();
    await untilJobs(['retry']);
    await makeDue('send-mail', knex);
    const message = await untilMessage({ state: 'failed', attempts: 2, data: null });
    expect(message.lastError).toMatch(/^E[A-Z]+/);
    await untilJobs(['failed']);
    await vi.waitFor(async () => expect((await jobsOf('give-up-mail', knex)).map(({ state }) => state)).toEqual(['completed']), UNTIL);
  });

  test('handed out twice is sent once', async () => {
    await queueOne();
    const [job] = await jobsOf('send-mail', knex);
    await knex.raw(`insert into pgboss.job (name, data, retry_limit, retry_delay, retry_backoff) select name, data, 5, 1, true from pgboss.job where id = ?`, [
      job!.id,
    ]);
    runJobs();
    await untilMessage({ state: 'sent' });
    await vi.waitFor(async () => {
      await makeDue('send-mail', knex);
      expect((await jobsOf('send-mail', knex)).map(({ state }) => state)).toEqual(['completed', 'completed']);
    }, UNTIL);
    expect(server.taken).toHaveLength(1);
    expect(await theMessage()).toMatchObject({ attempts: 1 });
  });

  test('is sent once although the database went away between sending and noting it', async () => {
    const url = new URL(database.url);
    const proxy = await startTcpProxy({ host: url.hostname, port: Number(url.port || '5432') });
    url.hostname = '127.0.0.1';
    url.port = String(proxy.port);
    const over = connect(url.href);
    cleanUps.push(proxy.cut, () => over.destroy());
    let mended: Promise<void> | undefined;
    server.beforeTaking(async () => {
      await proxy.cut();
      mended = vi.waitFor(() => expect(server.taken).toHaveLength(1), UNTIL).then(proxy.mend);
    });
    runJobs({ url: url.href, over });
    await queueOne();
    await untilMessage({ state: 'sent', attempts: 1 });
    await mended;
    expect(server.taken).toHaveLength(1);
  });

  test('of a closed account is not sent, and its address is forgotten', async () => {
    await queueOne();
    await knex.transaction((trx) => eraseMailOf(memberId, trx));
    expect(await theMessage()).toMatchObject({ state: 'failed', toAddress: null, data: null, lastError: 'account closed' });
    runJobs();
    await untilJobs(['completed']);
    expect(server.calls()).toBe(0);
  });
});
