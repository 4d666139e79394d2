import { verifyRegistrationResponse } from '@simplewebauthn/server';
import { decodeAttestationObject, isoBase64URL } from '@simplewebauthn/server/helpers';
import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import { z } from 'zod';
import { Passkey } from '#db/models/passkey.ts';
import { requireRecentProof } from '#server/policies/identity.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { changeSecondFactors } from './change-second-factors.ts';
import type { PasskeySite } from './passkey-site.ts';
import { makeFirstRecoveryCodes } from './recovery-codes.ts';
import { takeChallenge } from './webauthn-challenges.ts';

/** Web Authentication, 5.1.8.1 `RegistrationResponseJSON`: of it, what is used. */
const RegistrationResponse = z.object({
  id: z.string(),
  rawId: z.string(),
  type: z.literal('public-key'),
  response: z.object({
    clientDataJSON: z.string(),
    attestationObject: z.string(),
    transports: z.array(z.string().max(40)).max(10).default([]),
  }),
});
type RegistrationResponse = z.infer<typeof RegistrationResponse>;

type Registration = NonNullable<Awaited<ReturnType<typeof verifyRegistrationResponse>>['registrationInfo']>;

export type NewPasskey = {
  readonly name: string;
  /** What the browser answered, unread. */
  readonly response: unknown;
};

export type AddedPasskey = {
  readonly passkey: Passkey;
  /** None where the member still had some. */
  readonly recoveryCodes: readonly string[];
};

/**
 * Finishes adding a passkey with what a device made for the challenge it was given.
 *
 * @throws ProblemError `invalid` at `response` where it is not that; `conflict` for a passkey that is on record;
 *   `identity-not-confirmed`.
 */
export async function addPasskey(
  viewer: MemberViewer,
  { name, response }: NewPasskey,
  context: RequestContext,
  site: PasskeySite,
  knex: Knex,
): Promise<AddedPasskey> {
  requireRecentProof(viewer);
  const parsed = RegistrationResponse.safeParse(response);
  if (!parsed.success) throw notOfThisChallenge(parsed.error);
  const asked = await takeChallenge(parsed.data.response.clientDataJSON, { memberId: viewer.id, purpose: 'add' }, knex);
  if (!asked) throw notOfThisChallenge();
  const { credential, credentialBackedUp } = await verify(parsed.data, asked.challenge, site);

  return changeSecondFactors(
    viewer,
    { way: 'passkey', deed: 'added' },
    async (_member, trx) => {
      const passkey = await Passkey.query(trx).insertAndFetch({
        id: uuidV7(),
        memberId: viewer.id,
        credentialId: credential.id,
        publicKey: Buffer.from(credential.publicKey),
        counter: String(credential.counter),
        transports: parsed.data.response.transports,
        name,
        backedUp: credentialBackedUp,
      });
      return { passkey, recoveryCodes: await makeFirstRecoveryCodes(viewer.id, trx) };
    },
    context,
    knex,
  );
}

async function verify({ id, rawId, type, response }: RegistrationResponse, challenge: string, { rpId, origin }: PasskeySite): Promise<Registration> {
  const { clientDataJSON, attestationObject } = response;
  try {
    refuseCertificates(attestationObject);
    const { registrationInfo } = await verifyRegistrationResponse({
      response: { id, rawId, type, response: { clientDataJSON, attestationObject }, clientExtensionResults: {} },
      expectedChallenge: challenge,
      expectedOrigin: origin,
      expectedRPID: rpId,
      requireUserVerification: true,
    });
    if (!registrationInfo) throw new RangeError('The device’s own signature is wrong');
    return registrationInfo;
  } catch (cause) {
    throw notOfThisChallenge(cause);
  }
}

/**
 * None are asked for, so browsers send none but a device's own signature. Read they would be fetched for, from wherever they say.
 *
 * @throws RangeError
 */
function refuseCertificates(attestationObject: string): void {
  const attestation = decodeAttestationObject(isoBase64URL.toBuffer(attestationObject));
  const format = attestation.get('fmt');
  const isOwn = format === 'packed' && attestation.get('attStmt').get('x5c') === undefined;
  if (format !== 'none' && !isOwn) throw new RangeError('Attested by certificates, which were not asked for');
}

function notOfThisChallenge(cause?: unknown): ProblemError {
  return new ProblemError('invalid', 'The passkey could not be added. Begin again.', {
    errors: [{ path: ['response'], message: 'Not what was asked for, answered before, or too late' }],
    cause,
  });
}
