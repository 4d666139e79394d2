import type { Knex } from 'knex';
import type { Member } from '#db/models/member.ts';
import type { MailData } from '#server/mail/mail-templates.ts';
import { queueMail } from '#server/mail/queue-mail.ts';
import { notify } from '#server/services/notices/notify.ts';

type SecondFactorChange = MailData<'second-factor-changed'>['change'];

const TITLES = {
  'authenticator-added': 'An authenticator was added to your account',
  'authenticator-removed': 'The authenticator was removed from your account',
  'passkey-added': 'A passkey was added to your account',
  'passkey-removed': 'A passkey was removed from your account',
  'recovery-codes-made': 'New recovery codes were made for your account',
  'recovery-code-used': 'A recovery code was used to sign in to your account',
} as const satisfies Record<SecondFactorChange, string>;

/** Tells a member, by letter and here, that the ways to sign in to their account changed: so they learn of it if it was not them. */
export async function tellSecondFactorChange(
  { id, email }: Pick<Member, 'id' | 'email'>,
  change: SecondFactorChange,
  trx: Knex.Transaction,
): Promise<void> {
  if (email !== null) await queueMail({ to: email, template: 'second-factor-changed', data: { change }, memberId: id }, trx);
  const body = 'If it was not you, set a new password at once, which also ends every session, and tell a registrar.';
  await notify({ memberId: id, kind: 'account', title: TITLES[change], body, href: '/account' }, trx);
}
