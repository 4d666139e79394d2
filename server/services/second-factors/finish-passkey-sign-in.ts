import { verifyAuthenticationResponse } from '@simplewebauthn/server';
import type { Knex } from 'knex';
import { z } from 'zod';
import { Member } from '#db/models/member.ts';
import { Passkey } from '#db/models/passkey.ts';
import type { WebauthnChallenge } from '#db/models/webauthn-challenge.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { claimAttempt, forgiveAttempts } from '#server/services/people/attempts.ts';
import { completeSignIn } from '#server/services/people/complete-sign-in.ts';
import type { MeOnRecord } from '#server/services/people/read-me.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { hashOfSecret } from '#server/services/people/secrets.ts';
import type { SignInRules } from '#server/services/people/sign-in.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { withTransaction } from '#server/services/transaction.ts';
import type { PasskeySite } from './passkey-site.ts';
import { takeChallenge } from './webauthn-challenges.ts';

/** Web Authentication, 5.1.8.2 `AuthenticationResponseJSON`: of it, what is used. */
const AuthenticationResponse = z.object({
  id: z.string(),
  rawId: z.string(),
  type: z.literal('public-key'),
  response: z.object({
    clientDataJSON: z.string(),
    authenticatorData: z.string(),
    signature: z.string(),
    userHandle: z.string().nullish(),
  }),
});
type AuthenticationResponse = z.infer<typeof AuthenticationResponse>;

export type PasskeySignInRules = SignInRules & { readonly site: PasskeySite };

const REFUSALS = {
  'wrong-passkey': ['not-signed-in', 'This passkey does not sign in here, or the answer came too late. Try again.'],
  suspended: ['not-allowed', 'This account is suspended. The letter to its address says why.'],
  demo: ['not-allowed', 'The demo’s accounts are for trying the register out; here they are closed.'],
} as const;
type Refused = { readonly refused: keyof typeof REFUSALS };

/**
 * Signs in with a passkey: alone, or as the second factor after a password. A device that knows its user is both something they have and
 * something they know or are.
 *
 * @throws ProblemError `not-signed-in` for whatever is wrong with the passkey or its signature; `not-allowed` to whoever has the passkey of
 *   an account that is suspended, or of the demo's in production; `invalid` at `response`; `too-many-requests`.
 */
export async function finishPasskeySignIn(
  response: unknown,
  context: RequestContext,
  rules: PasskeySignInRules,
  knex: Knex,
): Promise<MeOnRecord> {
  const parsed = AuthenticationResponse.safeParse(response);
  if (!parsed.success) {
    throw new ProblemError('invalid', 'See which, and why, under errors.', {
      errors: [{ path: ['response'], message: 'Not what a browser answers' }],
      cause: parsed.error,
    });
  }
  const assertion = parsed.data;
  const account = hashOfSecret(assertion.id);
  await claimAttempt({ kind: 'second-factor', account, network: context.network }, knex);
  const challenge = await takeChallenge(assertion.response.clientDataJSON, { memberId: null, purpose: 'sign-in' }, knex);

  const outcome = await withTransaction<Refused | { readonly me: MeOnRecord }>(knex, async (trx) => {
    const found = await lockPasskey(assertion.id, trx);
    if (!found || !challenge || !(await use(found.passkey, assertion, challenge, rules.site, trx))) {
      return refuse('wrong-passkey', found?.member, context, trx);
    }
    const closed = whyClosed(found.member, rules);
    if (closed !== null) return refuse(closed, found.member, context, trx);
    await forgiveAttempts('second-factor', account, trx);
    return { me: await completeSignIn(found.member, 'second-factor', context, trx) };
  });
  if ('me' in outcome) return outcome.me;
  const [kind, detail] = REFUSALS[outcome.refused];
  throw new ProblemError(kind, detail);
}

/** First the member, as everywhere, then the passkey, whose counter nobody else may move meanwhile. */
async function lockPasskey(credentialId: string, trx: Knex.Transaction): Promise<{ readonly member: Member; readonly passkey: Passkey } | null> {
  const known = await Passkey.query(trx).findOne({ credentialId });
  if (!known) return null;
  const member = await Member.query(trx).findById(known.memberId).forUpdate();
  const passkey = await Passkey.query(trx).findById(known.id).forUpdate();
  return member && passkey ? { member, passkey } : null;
}

async function refuse(
  reason: keyof typeof REFUSALS,
  member: Member | undefined,
  { requestId }: RequestContext,
  trx: Knex.Transaction,
): Promise<Refused> {
  const subject = member ? { kind: 'member', id: member.id } : null;
  await writeAudit({ act: 'session.refused', actorId: null, subject, detail: { reason }, requestId }, trx);
  return { refused: reason };
}

function whyClosed({ suspendedAt, demo }: Member, { demoSignIns }: SignInRules): 'suspended' | 'demo' | null {
  if (suspendedAt !== null) return 'suspended';
  return demo && !demoSignIns ? 'demo' : null;
}

/** Whether the passkey signed the challenge for whoever it was given to; if so, notes how far it has counted. */
async function use(
  passkey: Passkey,
  assertion: AuthenticationResponse,
  challenge: WebauthnChallenge,
  site: PasskeySite,
  trx: Knex.Transaction,
): Promise<boolean> {
  if (!isMeantFor(passkey.memberId, assertion, challenge)) return false;
  const verified = await verify(passkey, assertion, challenge.challenge, site);
  if (!verified) return false;
  await passkey.$query(trx).patch({
    counter: String(verified.newCounter),
    backedUp: verified.credentialBackedUp,
    lastUsedAt: trx.raw('now()'),
  });
  return true;
}

/** After a password the challenge says whose passkey it must be; without one the device must say whose it takes it for. */
function isMeantFor(memberId: string, { response: { userHandle } }: AuthenticationResponse, challenge: WebauthnChallenge): boolean {
  if (challenge.memberId !== null && challenge.memberId !== memberId) return false;
  if (userHandle === null || userHandle === undefined) return challenge.memberId !== null;
  return Buffer.from(userHandle, 'base64url').toString('utf8') === memberId;
}

type Verified = { readonly newCounter: number; readonly credentialBackedUp: boolean };

async function verify(
  { credentialId, publicKey, counter }: Passkey,
  { id, rawId, type, response: { clientDataJSON, authenticatorData, signature } }: AuthenticationResponse,
  challenge: string,
  { rpId, origin }: PasskeySite,
): Promise<Verified | null> {
  try {
    const { verified, authenticationInfo } = await verifyAuthenticationResponse({
      response: { id, rawId, type, response: { clientDataJSON, authenticatorData, signature }, clientExtensionResults: {} },
      expectedChallenge: challenge,
      expectedOrigin: origin,
      expectedRPID: rpId,
      credential: { id: credentialId, publicKey: new Uint8Array(publicKey), counter: Number(counter) },
      requireUserVerification: true,
    });
    return verified ? authenticationInfo : null;
  } catch {
    // Whatever is wrong with it, the library throws, and nothing here reaches further than the answer itself.
    return null;
  }
}
