import type { Knex } from 'knex';
import { Member } from '#db/models/member.ts';
import { Session } from '#db/models/session.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { accountKey, claimAttempt } from '#server/services/people/attempts.ts';
import { completeSignIn } from '#server/services/people/complete-sign-in.ts';
import type { MeOnRecord } from '#server/services/people/read-me.ts';
import type { RequestContext, SignInOwed } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { checkAuthenticatorCode } from './check-authenticator-code.ts';
import { takeRecoveryCode } from './recovery-codes.ts';
import { tellSecondFactorChange } from './tell-second-factor-change.ts';

export type SecondFactorCode = { readonly way: 'authenticator' | 'recovery-code'; readonly code: string };

/**
 * Finishes signing in, after the password, with a code. Either kind works once.
 *
 * @throws ProblemError `not-signed-in` where no password was given, or too long ago; `not-allowed` at `code`; `too-many-requests`.
 */
export async function giveSecondFactor(given: SecondFactorCode, context: RequestContext, knex: Knex): Promise<MeOnRecord> {
  const { owed } = context;
  if (!owed) throw beginAgain();
  const { id, email } = await Member.query(knex).findById(owed.memberId).throwIfNotFound();
  await claimAttempt({ kind: 'second-factor', account: accountKey(email ?? id), network: context.network }, knex);

  const me = await withTransaction(
    knex,
    async (trx) => {
      const member = await lockOwing(owed, trx);
      if (await isRight(given, member, context, trx)) return completeSignIn(member, 'second-factor', context, trx);
      await writeAudit(
        {
          act: 'session.refused',
          actorId: null,
          subject: { kind: 'member', id: member.id },
          detail: { reason: `wrong-${given.way}` },
          requestId: context.requestId,
        },
        trx,
      );
      return null;
    },
    { actorId: owed.memberId },
  );
  if (!me) {
    throw new ProblemError('not-allowed', 'That code does not work: mistyped, used before, or not the one of now.', {
      errors: [{ path: ['code'], message: 'This code does not work' }],
    });
  }
  return me;
}

/** Who gave the password, unless the account or the half-made session ended meanwhile. */
async function lockOwing({ memberId, sessionId }: SignInOwed, trx: Knex.Transaction): Promise<Member> {
  const member = await Member.query(trx).findById(memberId).whereNull('suspendedAt').whereNull('closedAt').forUpdate();
  const session = await Session.query(trx).findOne({ publicId: sessionId, memberId, stage: 'owed' });
  if (!member || !session) throw beginAgain();
  return member;
}

async function isRight({ way, code }: SecondFactorCode, member: Member, { requestId }: RequestContext, trx: Knex.Transaction): Promise<boolean> {
  if (way === 'authenticator') return checkAuthenticatorCode(member.id, code, trx);
  if (!(await takeRecoveryCode(member.id, code, trx))) return false;
  await tellSecondFactorChange(member, 'recovery-code-used', trx);
  await writeAudit({ act: 'recovery-code.used', actorId: member.id, subject: { kind: 'member', id: member.id }, requestId }, trx);
  return true;
}

function beginAgain(): ProblemError {
  return new ProblemError('not-signed-in', 'Begin with address and password.');
}
