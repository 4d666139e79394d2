import { createServer } from 'node:net';
import type { AddressInfo } from 'node:net';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { ZodError } from 'zod';
import { text } from '#server/mail/letter.ts';
import { writeLetter } from '#server/mail/mail-templates.ts';
import { createMailer, MailError } from '#server/mail/mailer.ts';
import type { Mailer } from '#server/mail/mailer.ts';
import { startMailServer } from '#tests/support/mail-server.ts';
import type { MailServer } from '#tests/support/mail-server.ts';

const ID = '01980000-0000-7000-8000-000000000001';
const TOKEN = 'Zm9yLXRlc3RzLW9ubHktMzItYnl0ZXMtb2Ytbm90aGk';
const ORIGIN = 'https://register.example';
const LETTER = writeLetter('confirm-address', { token: TOKEN }, ORIGIN);
/** Milliseconds; a test need not wait as long as a server does. */
const IMPATIENT = { connectionTimeout: 300, greetingTimeout: 300, socketTimeout: 300 };
const never = new AbortController().signal;

let server: MailServer;
let mailer: Mailer;
beforeEach(async () => {
  server = await startMailServer();
  mailer = createMailer({ url: server.url, from: 'post@register.example', origin: ORIGIN }, IMPATIENT);
});
afterEach(() => server.stop());

async function failureOf(sending: Promise<void>): Promise<unknown> {
  return sending.then(
    () => undefined,
    (error: unknown) => error,
  );
}

describe('the mailer', () => {
  test('sends one letter in text and HTML to one address, under the id of its row', async () => {
    await mailer.send({ id: ID, to: 'b@register.example', letter: LETTER }, never);
    expect(server.taken).toHaveLength(1);
    const { from, to, mail } = server.taken[0]!;
    expect([from, to]).toEqual(['post@register.example', ['b@register.example']]);
    expect(mail.messageId).toBe(`<${ID}@register.example>`);
    expect(mail.from?.text).toBe('"Pourbook" <post@register.example>');
    expect(mail.subject).toBe('Confirm your e-mail address');
    expect(mail.text).toContain(`https://register.example/confirm?token=${TOKEN}`);
    expect(mail.html).toContain(`href="https://register.example/confirm?token=${TOKEN}"`);
    expect(mail.headers.get('auto-submitted')).toBe('auto-generated');
    expect(mail.headers.has('list-unsubscribe')).toBe(false);
  });

  test('names one-click unsubscribing in the headers of a notice, as RFC 8058 section 3 writes them', async () => {
    const data = { kind: 'contribution', title: 'Entered', body: 'With a note.', href: null, unsubscribeToken: TOKEN };
    await mailer.send({ id: ID, to: 'b@register.example', letter: writeLetter('notice', data, ORIGIN) }, never);
    const header = server.taken[0]!.raw.split('\r\n\r\n', 1)[0]!.replaceAll(/\r\n[ \t]+/g, ' ');
    expect(header.split('\r\n')).toEqual(
      expect.arrayContaining([`List-Unsubscribe: <https://register.example/unsubscribe/${TOKEN}>`, 'List-Unsubscribe-Post: List-Unsubscribe=One-Click']),
    );
  });

  test.each(['Entered\r\nBcc: other@elsewhere.example', 'Entered\nBcc: other@elsewhere.example\n\nAnother body', `Entered ${'very '.repeat(60)}far`])(
    'lets no header in by a subject: %j',
    async (subject) => {
      await mailer.send({ id: ID, to: 'b@register.example', letter: { subject, blocks: [text('Here.')] } }, never);
      const { to, mail } = server.taken[0]!;
      expect(to).toEqual(['b@register.example']);
      expect(mail.headers.has('bcc')).toBe(false);
      expect(mail.subject).toBe(subject.replaceAll(/[\r\n]+/g, ' '));
      expect(mail.text?.trim()).toBe('Here.');
    },
  );

  test.each(['b@register.example, other@elsewhere.example', 'b@register.example\r\nBcc: other@elsewhere.example', '"other@elsewhere.example x"@register.example'])(
    'sends nothing to %j',
    async (to) => {
      await expect(mailer.send({ id: ID, to, letter: LETTER }, never)).rejects.toThrow(ZodError);
      expect(server.calls()).toBe(0);
    },
  );

  test.each([
    ['later', false],
    ['hang-up', false],
    ['never-from-us', false],
    ['never-to-them', true],
  ] as const)('tells of a server that says "%s" whether another try may help', async (manners, isFinal) => {
    server.behave(manners);
    const failure = await failureOf(mailer.send({ id: ID, to: 'b@register.example', letter: LETTER }, never));
    expect(failure).toBeInstanceOf(MailError);
    expect(failure).toMatchObject({ isFinal });
    // What the server said can hold the address; what is written down must not.
    expect(String(failure)).not.toMatch(/b@register|this test says so/);
    expect(server.taken).toEqual([]);
  });

  test.each(['hang-at-greeting', 'hang-at-end'] as const)('does not wait for ever for a server that is silent: %s', async (manners) => {
    server.behave(manners);
    const failure = await failureOf(mailer.send({ id: ID, to: 'b@register.example', letter: LETTER }, never));
    expect(failure).toMatchObject({ name: 'MailError', isFinal: false });
  });

  test('lets go when it is told to', async () => {
    server.behave('hang-at-end');
    const patient = createMailer({ url: server.url, from: 'post@register.example', origin: ORIGIN });
    const telling = new AbortController();
    const sending = failureOf(patient.send({ id: ID, to: 'b@register.example', letter: LETTER }, telling.signal));
    telling.abort();
    expect(await sending).toMatchObject({ name: 'MailError', isFinal: false });
  });

  test('fails at once where nobody listens', async () => {
    const nobody = createServer();
    await new Promise<void>((resolve) => nobody.listen(0, '127.0.0.1', resolve));
    const { port } = nobody.address() as AddressInfo;
    await new Promise((resolve) => nobody.close(resolve));
    const lost = createMailer({ url: `smtp://127.0.0.1:${port}`, from: 'post@register.example', origin: ORIGIN });
    expect(await failureOf(lost.send({ id: ID, to: 'b@register.example', letter: LETTER }, never))).toMatchObject({ name: 'MailError', isFinal: false });
  });
});
