import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import { z } from 'zod';
import { queueMail } from '#server/mail/queue-mail.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { accountKey, claimAttempt } from './attempts.ts';
import { issueLink } from './link-tokens.ts';
import { memberByEmail } from './member-by-email.ts';
import { refuseWeakPassword } from './password-rules.ts';
import { hashPassword } from './passwords.ts';
import type { RequestContext } from './request-context.ts';

export type SignUp = { readonly displayName: string; readonly email: string; readonly password: string };

/** An account nobody confirmed yet is whoever's signs up last: what the first one said of it counts for nothing. */
const OPEN = `
  insert into members (id, display_name, email, password_hash) values (:id, :displayName, :email, :passwordHash)
  on conflict (lower(email)) do update
    set display_name = excluded.display_name, email = excluded.email, password_hash = excluded.password_hash
    where members.email_verified_at is null and members.suspended_at is null
  returning id`;
const Opened = z.object({ rows: z.array(z.object({ id: z.string() })) });

/**
 * Opens an account and sends its address a link. Where the address is a member's already, nothing changes and a letter tells them so;
 * whoever asks sees no difference, in words or in work: one hash, the same statements, one letter.
 *
 * @throws ProblemError `invalid` at `password`; `too-many-requests`.
 */
export async function signUp({ displayName, email, password }: SignUp, { network, requestId }: RequestContext, knex: Knex): Promise<void> {
  refuseWeakPassword(password, { displayName, email, hasSecondFactor: false }, 'password');
  await claimAttempt({ kind: 'letter', account: accountKey(email), network }, knex);
  const passwordHash = await hashPassword(password);

  await withTransaction(knex, async (trx) => {
    const { rows } = Opened.parse(await trx.raw(OPEN, { id: uuidV7(), displayName, email, passwordHash }));
    const opened = rows[0]?.id ?? null;
    const member = await memberByEmail(email, trx).throwIfNotFound();
    const token = await issueLink({ memberId: opened, purpose: 'verify' }, trx);
    await (opened === null
      ? queueMail({ to: email, template: 'already-known', data: {}, memberId: member.id }, trx)
      : queueMail({ to: email, template: 'confirm-address', data: { token }, memberId: member.id }, trx));
    await writeAudit(
      { act: opened === null ? 'account.refused' : 'account.opened', actorId: null, subject: { kind: 'member', id: member.id }, requestId },
      trx,
    );
  });
}
