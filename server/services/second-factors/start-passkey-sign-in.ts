import { generateAuthenticationOptions } from '@simplewebauthn/server';
import type { PublicKeyCredentialRequestOptionsJSON } from '@simplewebauthn/server';
import type { Knex } from 'knex';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { listPasskeys } from './list-passkeys.ts';
import type { PasskeySite } from './passkey-site.ts';
import { CHALLENGE_LASTS, keepChallenge } from './webauthn-challenges.ts';

/**
 * Begins signing in with a passkey: after the password with one of the member's own, otherwise with any the device knows of, and nothing
 * told about whose there are.
 */
export async function startPasskeySignIn(
  { owed }: RequestContext,
  { rpId }: PasskeySite,
  knex: Knex,
): Promise<PublicKeyCredentialRequestOptionsJSON> {
  const own = owed === null ? [] : await listPasskeys(owed.memberId, knex);
  const options = await generateAuthenticationOptions({
    rpID: rpId,
    timeout: CHALLENGE_LASTS * 1_000,
    userVerification: 'required',
    allowCredentials: own.map(({ credentialId, transports }) => ({ id: credentialId, transports })),
  });
  await keepChallenge(options.challenge, { memberId: owed?.memberId ?? null, purpose: 'sign-in' }, knex);
  return options;
}
