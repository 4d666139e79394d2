import type { Knex } from 'knex';
import { Member } from '#db/models/member.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { accountKey, claimAttempt, forgiveAttempts } from './attempts.ts';
import { isPassword } from './passwords.ts';
import type { RequestContext } from './request-context.ts';

/** A member whose account is open: with an address and a password. */
export type AccountHolder = Member & { readonly email: string; readonly passwordHash: string };

/**
 * Has a signed-in member give their password once more. Guesses count with those at the door.
 *
 * @throws ProblemError `not-allowed` at `password`; `too-many-requests`.
 */
export async function requireOwnPassword(
  viewer: MemberViewer,
  password: string,
  { network, requestId }: RequestContext,
  knex: Knex,
): Promise<AccountHolder> {
  const member = await Member.query(knex).findById(viewer.id).throwIfNotFound();
  if (!isAccountHolder(member)) throw new ProblemError('not-signed-in', 'The account was closed meanwhile.');
  const account = accountKey(member.email);
  await claimAttempt({ kind: 'password', account, network }, knex);
  const matches = await isPassword(password, member.passwordHash);
  await withTransaction(knex, async (trx) => {
    if (matches) await forgiveAttempts('password', account, trx);
    else {
      const subject = { kind: 'member', id: viewer.id };
      await writeAudit({ act: 'session.refused', actorId: viewer.id, subject, detail: { reason: 'wrong-password' }, requestId }, trx);
    }
  });
  if (!matches) {
    throw new ProblemError('not-allowed', 'That is not your password.', { errors: [{ path: ['password'], message: 'Not your password' }] });
  }
  return member;
}

/** The member's row for as long as the transaction lasts, provided the password that was given is still theirs. */
export async function lockAccount(holder: AccountHolder, trx: Knex.Transaction): Promise<Member> {
  const member = await Member.query(trx)
    .findById(holder.id)
    .where({ passwordHash: holder.passwordHash, email: holder.email })
    .whereNull('suspendedAt')
    .forUpdate();
  if (!member) throw new ProblemError('conflict', 'Your account changed just now. Look at it again first.');
  return member;
}

function isAccountHolder(member: Member): member is AccountHolder {
  return member.email !== null && member.passwordHash !== null;
}
