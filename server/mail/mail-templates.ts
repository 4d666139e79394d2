import { z } from 'zod';
import { NoticeKind } from '#contract/notices.ts';
import { LinkToken, Role } from '#contract/people.ts';
import { foot, link, quote, text } from './letter.ts';
import type { Block, Letter } from './letter.ts';
import { SitePath } from './site-path.ts';

/** What was done to a member's second factors. */
const SECOND_FACTOR_CHANGES = {
  'authenticator-added': 'An authenticator was added to your account.',
  'authenticator-removed': 'The authenticator was removed from your account.',
  'passkey-added': 'A passkey was added to your account.',
  'passkey-removed': 'A passkey was removed from your account.',
  'recovery-codes-made': 'New recovery codes were made for your account. The old ones no longer work.',
  'recovery-code-used': 'A recovery code was used to sign in to your account. It will not work again.',
} as const;
const SECOND_FACTOR_CHANGE = Object.keys(SECOND_FACTOR_CHANGES) as [keyof typeof SECOND_FACTOR_CHANGES];

const NOTICE_NAMES = {
  account: 'your account',
  role: 'your role',
  contribution: 'what you entered',
  recomputed: 'marks that were worked out anew',
  reading: 'readings of marks',
  handover: 'machines handed over',
  message: 'messages',
} as const satisfies Record<NoticeKind, string>;

const Nothing = z.strictObject({});
const WithToken = z.strictObject({ token: LinkToken });

const FOOT = 'Pourbook, the open register of cast marks. Nobody reads answers to this address.';
const UNASKED = 'If it was not you, leave this letter be: nothing happens without the link.';
const NOT_YOU = 'If it was not you, set a new password at once, which also ends every session, and tell a registrar.';

/**
 * Every letter there is. No letter names the member it goes to: whoever signs up chooses the name and the address, and could so write
 * to strangers in our name.
 */
export const MAIL_TEMPLATES = {
  'confirm-address': template(WithToken, ({ token }, at) => ({
    subject: 'Confirm your e-mail address',
    blocks: [
      text('Somebody, most likely you, opened an account on Pourbook with this address. Follow the link to confirm it. It works once, within 24 hours.'),
      link('Confirm the address', at('/confirm', { token })),
      text(UNASKED),
    ],
  })),

  'already-known': template(Nothing, (_data, at) => ({
    subject: 'You already have an account',
    blocks: [
      text('Somebody, most likely you, wanted to use this address for an account on Pourbook. It belongs to one already, so nothing was changed.'),
      link('Sign in', at('/sign-in')),
      link('Set a new password', at('/password/forgotten')),
    ],
  })),

  'set-new-password': template(WithToken, ({ token }, at) => ({
    subject: 'Set a new password',
    blocks: [
      text('Somebody, most likely you, asked for a new password. Follow the link to set one. It works once, within an hour.'),
      link('Set a new password', at('/password/new', { token })),
      text(UNASKED),
    ],
  })),

  'no-account': template(Nothing, (_data, at) => ({
    subject: 'There is no account with this address',
    blocks: [
      text('Somebody, most likely you, asked for a new password on Pourbook. No account has this address; perhaps yours has another.'),
      link('Open an account', at('/sign-up')),
      text('If it was not you, leave this letter be: nothing happens.'),
    ],
  })),

  'password-changed': template(Nothing, (_data, at) => ({
    subject: 'Your password was changed',
    blocks: [text('The password of your account was changed.'), text(NOT_YOU), link('Set a new password', at('/password/forgotten'))],
  })),

  'address-changing': template(z.strictObject({ newAddress: z.string() }), ({ newAddress }, at) => ({
    subject: 'Your e-mail address is to be changed',
    blocks: [
      text('Somebody, most likely you, asked that from now on we write to this address instead of yours:'),
      quote(newAddress),
      text('The change takes effect once the new address is confirmed.'),
      text(NOT_YOU),
      link('Set a new password', at('/password/forgotten')),
    ],
  })),

  'confirm-new-address': template(WithToken, ({ token }, at) => ({
    subject: 'Confirm your new e-mail address',
    blocks: [
      text('Somebody, most likely you, asked that we write to this address from now on. Follow the link to confirm it. It works once, within 24 hours.'),
      link('Confirm the new address', at('/confirm', { token })),
      text(UNASKED),
    ],
  })),

  'second-factor-changed': template(z.strictObject({ change: z.enum(SECOND_FACTOR_CHANGE) }), ({ change }, at) => ({
    subject: 'The ways to sign in to your account changed',
    blocks: [text(SECOND_FACTOR_CHANGES[change]), text(NOT_YOU), link('Set a new password', at('/password/forgotten'))],
  })),

  'role-changed': template(z.strictObject({ role: Role, moderates: z.array(z.string()).nullable() }), (data, at) => ({
    subject: 'Your role was changed',
    blocks: [text(sayRole(data)), text('Sign in anew to act in it.'), link('Sign in', at('/sign-in'))],
  })),

  suspended: template(z.strictObject({ reason: z.string() }), ({ reason }) => ({
    subject: 'Your account was suspended',
    blocks: [text('A registrar suspended your account, so you can’t sign in. The reason given is:'), quote(reason)],
  })),

  unsuspended: template(Nothing, (_data, at) => ({
    subject: 'Your account is open again',
    blocks: [text('A registrar ended the suspension of your account. You can sign in again.'), link('Sign in', at('/sign-in'))],
  })),

  'account-closed': template(Nothing, () => ({
    subject: 'Your account is closed',
    blocks: [
      text('Your account on Pourbook is closed. Private machines, parts and photos are gone; what you entered into the register stays, under “a former member”.'),
      text('This was the last letter to this address.'),
    ],
  })),

  notice: template(
    z.strictObject({ kind: NoticeKind, title: z.string(), body: z.string(), href: SitePath.nullable(), unsubscribeToken: LinkToken }),
    ({ kind, title, body, href, unsubscribeToken }, at) => {
      const unsubscribe = at(`/unsubscribe/${unsubscribeToken}`);
      return {
        subject: title,
        blocks: [
          text(title),
          quote(body),
          ...(href === null ? [] : [link('See it on Pourbook', at(href))]),
          text(`You get this because you want notices about ${NOTICE_NAMES[kind]} by e-mail.`),
          link('Stop letters of this kind', unsubscribe),
        ],
        unsubscribe,
      };
    },
  ),
};

export type MailTemplate = keyof typeof MAIL_TEMPLATES;
export type MailData<Name extends MailTemplate> = z.input<(typeof MAIL_TEMPLATES)[Name]['data']>;

/** A letter ready to be set; `unsubscribe` is where its reader is rid of its kind. */
export type WrittenLetter = Letter & { readonly unsubscribe?: string };

/** Writes a letter as kept in a row, with links to the site at `origin`. */
export function writeLetter(name: string, data: unknown, origin: string): WrittenLetter {
  const found = Object.entries(MAIL_TEMPLATES).find(([known]) => known === name);
  if (!found) throw new RangeError(`There is no letter named ${name}`);
  return found[1].write(data, origin);
}

/** Makes a whole address of a path of the site. */
type AddressMaker = (path: string, query?: Readonly<Record<string, string>>) => string;

type Template<Data extends z.ZodObject> = {
  readonly data: Data;
  readonly write: (data: unknown, origin: string) => WrittenLetter;
};

function template<Data extends z.ZodObject>(data: Data, write: (data: z.output<Data>, at: AddressMaker) => WrittenLetter): Template<Data> {
  return {
    data,
    write: (given, origin) => {
      const letter = write(data.parse(given), (path, query = {}) => {
        const address = new URL(path, origin);
        for (const [name, value] of Object.entries(query)) address.searchParams.set(name, value);
        return address.href;
      });
      const blocks: readonly Block[] = [...letter.blocks, foot(FOOT)];
      return { ...letter, blocks };
    },
  };
}

function sayRole({ role, moderates }: { readonly role: Role; readonly moderates: readonly string[] | null }): string {
  switch (role) {
    case 'member':
      return 'You are a member now, without other duties.';
    case 'moderator':
      return moderates === null
        ? 'You are a moderator now, for all makers. Moderators need a second factor before they can act.'
        : `You are a moderator now, for ${moderates.join(', ')}. Moderators need a second factor before they can act.`;
    case 'registrar':
      return 'You are a registrar now. Registrars need a second factor before they can act.';
  }
}
