import type { Knex } from 'knex';
import { Member } from '#db/models/member.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { checkAuthenticatorCode } from '#server/services/second-factors/check-authenticator-code.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { accountKey, claimAttempt, forgiveAttempts } from './attempts.ts';
import type { RequestContext } from './request-context.ts';
import { requireOwnPassword } from './require-own-password.ts';

export type Proof =
  | { readonly way: 'password'; readonly password: string }
  | { readonly way: 'authenticator'; readonly code: string };

/**
 * Takes a proof of who is asking, good for ten minutes, and gives the session a new secret.
 *
 * @throws ProblemError `not-allowed` at `password` or `code`; `too-many-requests`.
 */
export async function confirmIdentity(viewer: MemberViewer, proof: Proof, context: RequestContext, knex: Knex): Promise<void> {
  if (proof.way === 'password') {
    await requireOwnPassword(viewer, proof.password, context, knex);
    await withTransaction(knex, (trx) => context.session.renew(viewer.strength, trx));
    return;
  }
  const { email } = await Member.query(knex).findById(viewer.id).throwIfNotFound();
  const account = accountKey(email ?? viewer.id);
  await claimAttempt({ kind: 'second-factor', account, network: context.network }, knex);
  const isRight = await withTransaction(knex, async (trx) => {
    if (!(await checkAuthenticatorCode(viewer.id, proof.code, trx))) return false;
    await forgiveAttempts('second-factor', account, trx);
    await context.session.renew(viewer.strength, trx);
    return true;
  });
  if (!isRight) {
    throw new ProblemError('not-allowed', 'That is not the code of now.', { errors: [{ path: ['code'], message: 'Not the code of now' }] });
  }
}
