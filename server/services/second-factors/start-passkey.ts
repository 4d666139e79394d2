import { generateRegistrationOptions } from '@simplewebauthn/server';
import type { PublicKeyCredentialCreationOptionsJSON } from '@simplewebauthn/server';
import type { Knex } from 'knex';
import { Member } from '#db/models/member.ts';
import { requireRecentProof } from '#server/policies/identity.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';
import { listPasskeys } from './list-passkeys.ts';
import type { PasskeySite } from './passkey-site.ts';
import { SITE_NAME } from './site-name.ts';
import { CHALLENGE_LASTS, keepChallenge } from './webauthn-challenges.ts';

/**
 * Begins adding a passkey: what the browser is to ask a device for. The device must know its user, by finger or PIN, and keep the passkey
 * with whose it is, so that it signs in without an address.
 *
 * @throws ProblemError `identity-not-confirmed`.
 */
export async function startPasskey(viewer: MemberViewer, { rpId }: PasskeySite, knex: Knex): Promise<PublicKeyCredentialCreationOptionsJSON> {
  requireRecentProof(viewer);
  const { email, displayName } = await Member.query(knex).findById(viewer.id).throwIfNotFound();
  const options = await generateRegistrationOptions({
    rpName: SITE_NAME,
    rpID: rpId,
    userID: new TextEncoder().encode(viewer.id),
    userName: email ?? displayName,
    userDisplayName: displayName,
    timeout: CHALLENGE_LASTS * 1_000,
    attestationType: 'none',
    excludeCredentials: (await listPasskeys(viewer.id, knex)).map(({ credentialId, transports }) => ({ id: credentialId, transports })),
    authenticatorSelection: { residentKey: 'required', userVerification: 'required' },
  });
  await keepChallenge(options.challenge, { memberId: viewer.id, purpose: 'add' }, knex);
  return options;
}
