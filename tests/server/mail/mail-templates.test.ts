import { describe, expect, test } from 'vitest';
import { ZodError } from 'zod';
import { htmlOf, subjectOf, textOf } from '#server/mail/letter.ts';
import { MAIL_TEMPLATES, writeLetter } from '#server/mail/mail-templates.ts';
import type { MailData, MailTemplate } from '#server/mail/mail-templates.ts';

const ORIGIN = 'https://register.example';
const TOKEN = 'Zm9yLXRlc3RzLW9ubHktMzItYnl0ZXMtb2Ytbm90aGk';

const SAMPLES: { readonly [Name in MailTemplate]: { readonly data: MailData<Name>; readonly links: readonly string[] } } = {
  'confirm-address': { data: { token: TOKEN }, links: [`/confirm?token=${TOKEN}`] },
  'already-known': { data: {}, links: ['/sign-in', '/password/forgotten'] },
  'set-new-password': { data: { token: TOKEN }, links: [`/password/new?token=${TOKEN}`] },
  'no-account': { data: {}, links: ['/sign-up'] },
  'password-changed': { data: {}, links: ['/password/forgotten'] },
  'address-changing': { data: { newAddress: 'new@register.example' }, links: ['/password/forgotten'] },
  'confirm-new-address': { data: { token: TOKEN }, links: [`/confirm?token=${TOKEN}`] },
  'second-factor-changed': { data: { change: 'passkey-added' }, links: ['/password/forgotten'] },
  'role-changed': { data: { role: 'moderator', moderates: ['Hesper Lathe Company'] }, links: ['/sign-in'] },
  suspended: { data: { reason: 'Entered the same drawing forty times.' }, links: [] },
  unsuspended: { data: {}, links: ['/sign-in'] },
  'account-closed': { data: {}, links: [] },
  notice: {
    data: { kind: 'contribution', title: 'Your contribution was entered', body: 'With a note.', href: '/castings/brackwater-b4406', unsubscribeToken: TOKEN },
    links: ['/castings/brackwater-b4406', `/unsubscribe/${TOKEN}`],
  },
};
const NAMES = Object.keys(MAIL_TEMPLATES) as MailTemplate[];

describe.each(NAMES)('the letter %s', (name) => {
  const { data, links } = SAMPLES[name];
  const letter = writeLetter(name, data, ORIGIN);

  test('links to the same addresses of the site in text and in HTML', () => {
    const whole = links.map((path) => `${ORIGIN}${path}`);
    expect(textOf(letter).match(/https?:\/\/\S+/g) ?? []).toEqual(whole);
    const inHtml = [...htmlOf(letter).matchAll(/href="([^"]*)"/g)].map(([, href]) => href?.replaceAll('&amp;', '&'));
    expect(inHtml).toEqual(whole);
  });

  test('has a subject, says something and keeps to the voice of the register', () => {
    expect(subjectOf(letter)).toMatch(/^[A-Z][^!]{5,80}$/);
    expect(textOf(letter).split(/\s+/).length).toBeGreaterThan(20);
    expect(textOf(letter)).not.toContain('!');
  });

  test('takes no data but its own', () => {
    expect(() => writeLetter(name, { ...data, displayName: 'Anybody' }, ORIGIN)).toThrow(ZodError);
  });
});

describe('letters', () => {
  test('that are not known are an error', () => {
    expect(() => writeLetter('good-news', {}, ORIGIN)).toThrow(RangeError);
    expect(() => writeLetter('toString', {}, ORIGIN)).toThrow(RangeError);
  });

  test.each(['//elsewhere.example/x', '/\\elsewhere.example', 'https://elsewhere.example', 'javascript:alert(1)', '/a b', '/a\tb', 'castings'])(
    'never lead from a notice to %s',
    (href) => {
      expect(() => writeLetter('notice', { ...SAMPLES.notice.data, href }, ORIGIN)).toThrow(ZodError);
    },
  );

  test('name the makers a moderator decides for, or say that it is all', () => {
    expect(textOf(writeLetter('role-changed', { role: 'moderator', moderates: ['Hesper Lathe Company', 'Skerry Foundry'] }, ORIGIN))).toContain(
      'for Hesper Lathe Company, Skerry Foundry.',
    );
    expect(textOf(writeLetter('role-changed', { role: 'moderator', moderates: null }, ORIGIN))).toContain('for all makers.');
  });

  test('about a second factor say what was done', () => {
    expect(textOf(writeLetter('second-factor-changed', { change: 'recovery-code-used' }, ORIGIN))).toContain('A recovery code was used');
    expect(() => writeLetter('second-factor-changed', { change: 'something-else' }, ORIGIN)).toThrow(ZodError);
  });
});
