import type { Knex } from 'knex';
import { Member } from '#db/models/member.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { hasSecondFactor, readSecondFactors } from '#server/services/second-factors/read-second-factors.ts';
import type { SecondFactors } from '#server/services/second-factors/read-second-factors.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { accountKey, claimAttempt, forgiveAttempts } from './attempts.ts';
import { completeSignIn } from './complete-sign-in.ts';
import { memberByEmail } from './member-by-email.ts';
import { hashPassword, isOutdated, isPassword } from './passwords.ts';
import type { MeOnRecord } from './read-me.ts';
import type { RequestContext } from './request-context.ts';

export type SignedIn =
  | { readonly state: 'signed-in'; readonly me: MeOnRecord }
  | { readonly state: 'second-factor'; readonly secondFactors: SecondFactors };

export type SignInRules = {
  /** Whether the demo's accounts, whose passwords are printed, may be used here. */
  readonly demoSignIns: boolean;
};

/**
 * Signs in with address and password, or as far as these go: where the member has a second factor, it is owed.
 *
 * @throws ProblemError `not-signed-in`, the same for a wrong password, an address nobody has and one that was never confirmed;
 *   `not-allowed` to whoever knows the password of an account that is suspended, or of the demo's in production; `too-many-requests`.
 */
export async function signIn(
  { email, password }: { readonly email: string; readonly password: string },
  context: RequestContext,
  { demoSignIns }: SignInRules,
  knex: Knex,
): Promise<SignedIn> {
  const account = accountKey(email);
  await claimAttempt({ kind: 'password', account, network: context.network }, knex);
  const member = await memberByEmail(email, knex);
  const matches = await isPassword(password, member?.passwordHash);
  if (!member?.passwordHash || !matches || member.emailVerifiedAt === null) {
    return refuse(member, matches ? 'not-verified' : 'wrong-password', context, knex);
  }
  if (member.suspendedAt !== null) return refuse(member, 'suspended', context, knex);
  if (member.demo && !demoSignIns) return refuse(member, 'demo', context, knex);

  const { passwordHash } = member;
  const renewedHash = isOutdated(passwordHash) ? await hashPassword(password) : null;
  const outcome = await withTransaction<SignedIn | null>(
    knex,
    async (trx) => {
      // Comparing takes a while, in which the account may have been suspended, closed, or given another password.
      const current = await Member.query(trx).findById(member.id).where({ passwordHash }).whereNull('suspendedAt').forUpdate();
      if (!current) return null;
      if (renewedHash !== null) await current.$query(trx).patch({ passwordHash: renewedHash });
      const secondFactors = await readSecondFactors(member.id, trx);
      if (!hasSecondFactor(secondFactors)) {
        return { state: 'signed-in', me: await completeSignIn(current, 'password', context, trx) };
      }
      await forgiveAttempts('password', account, trx);
      await context.session.start({ memberId: member.id, stage: 'owed', strength: 'password' }, trx);
      return { state: 'second-factor', secondFactors };
    },
    { actorId: member.id },
  );
  return outcome ?? refuse(member, 'changed-meanwhile', context, knex);
}

const REFUSALS = {
  'wrong-password': ['not-signed-in', 'Address and password do not match, or the address was never confirmed.'],
  'not-verified': ['not-signed-in', 'Address and password do not match, or the address was never confirmed.'],
  'changed-meanwhile': ['not-signed-in', 'The account changed just now. Sign in once more.'],
  suspended: ['not-allowed', 'This account is suspended. The letter to its address says why.'],
  demo: ['not-allowed', 'The demo’s accounts are for trying the register out; here they are closed.'],
} as const;

async function refuse(
  member: Member | undefined,
  reason: keyof typeof REFUSALS,
  { requestId }: RequestContext,
  knex: Knex,
): Promise<never> {
  await withTransaction(knex, async (trx) => {
    const subject = member ? { kind: 'member', id: member.id } : null;
    await writeAudit({ act: 'session.refused', actorId: null, subject, detail: { reason }, requestId }, trx);
  });
  const [kind, detail] = REFUSALS[reason];
  throw new ProblemError(kind, detail);
}
