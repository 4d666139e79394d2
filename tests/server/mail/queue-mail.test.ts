import { describe, expect, test } from 'vitest';
import { ZodError } from 'zod';
import { MailMessage } from '#db/models/mail-message.ts';
import { queueMail } from '#server/mail/queue-mail.ts';
import { useDatabase } from '#tests/support/database.ts';
import { jobsOf } from '#tests/support/jobs.ts';

/**
 * Texts that mail libraries have read as other addresses, or as more than one: design page on reliability, section 11, measured with
 * nodemailer; RFC 5322 sections 3.2.2 (comments), 3.4 (lists, groups, quoted local parts).
 */
const NOT_ONE_ADDRESS = [
  'b@register.example\r\nBcc: other@elsewhere.example',
  'b@register.example\nBcc: other@elsewhere.example',
  'b@register.example, other@elsewhere.example',
  'b@register.example; other@elsewhere.example',
  'g: a@register.example, b@elsewhere.example;',
  'Name <b@register.example>',
  '<b@register.example>',
  '"other@elsewhere.example x"@register.example',
  '"other@elsewhere.example>"@register.example',
  'b(comment)@register.example',
  'b@register.example (other@elsewhere.example)',
  'b@elsewhere.example@register.example',
  'b@[127.0.0.1]',
  'b\0@register.example',
  'b\u0085c@register.example',
  'b c@register.example',
  'b\tc@register.example',
  String.raw`b\c@register.example`,
  'b@register',
  '@register.example',
  'b@',
  '',
  `${'b'.repeat(250)}@register.example`,
];

const database = useDatabase();

describe('a letter', () => {
  test('is written down together with its job', async () => {
    await queueMail({ to: 'b@register.example', template: 'already-known', data: {} }, database.knex);
    const [message] = await MailMessage.query(database.knex);
    expect(message).toMatchObject({
      toAddress: 'b@register.example',
      memberId: null,
      template: 'already-known',
      data: {},
      state: 'queued',
      attempts: 0,
      lastError: null,
      settledAt: null,
    });
    expect(await jobsOf('send-mail', database.knex)).toEqual([expect.objectContaining({ state: 'created', data: { messageId: message!.id } })]);
  });

  test('goes with the transaction that wrote it', async () => {
    const failed = database.knex.transaction(async (trx) => {
      await queueMail({ to: 'b@register.example', template: 'already-known', data: {} }, trx);
      throw new Error('changed our mind');
    });
    await expect(failed).rejects.toThrow('changed our mind');
    expect(await MailMessage.query(database.knex).resultSize()).toBe(0);
    expect(await jobsOf('send-mail', database.knex)).toEqual([]);
  });

  test.each(NOT_ONE_ADDRESS)('is not written to %j', async (to) => {
    await expect(queueMail({ to, template: 'already-known', data: {} }, database.knex)).rejects.toThrow(ZodError);
    expect(await MailMessage.query(database.knex).resultSize()).toBe(0);
    expect(await jobsOf('send-mail', database.knex)).toEqual([]);
  });

  test('with data its template does not take is not written', async () => {
    await expect(queueMail({ to: 'b@register.example', template: 'confirm-address', data: { token: 'short' } }, database.knex)).rejects.toThrow(ZodError);
    expect(await MailMessage.query(database.knex).resultSize()).toBe(0);
  });

  test.each(['b@register.example, other@elsewhere.example', 'b@register.example\r\nBcc: x@y.example', '<b@register.example>'])(
    'to %j is refused by the database as well',
    async (toAddress) => {
      const insert = database.knex.transaction(async (trx) => {
        await MailMessage.query(trx).insert({ id: '01980000-0000-7000-8000-000000000001', toAddress, template: 'already-known', data: {} });
      });
      await expect(insert).rejects.toMatchObject({ nativeError: { code: '23514' } });
    },
  );
});
