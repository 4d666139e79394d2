import type { Knex } from 'knex';
import { z } from 'zod';
import { WebauthnChallenge } from '#db/models/webauthn-challenge.ts';

/** Seconds in which a device must have signed; also how long the browser asks for it. */
export const CHALLENGE_LASTS = 300;

type Asked = {
  /** `null`: somebody who has not said yet who they are. */
  readonly memberId: string | null;
  readonly purpose: WebauthnChallenge['purpose'];
};

const ClientData = z.object({ challenge: z.string() });

/** Keeps a challenge that is being handed out, and clears away those nobody answered. */
export async function keepChallenge(challenge: string, { memberId, purpose }: Asked, knex: Knex): Promise<void> {
  await WebauthnChallenge.query(knex).delete().whereRaw('expires_at <= now()');
  await WebauthnChallenge.query(knex).insert({
    challenge,
    memberId,
    purpose,
    expiresAt: knex.raw('now() + make_interval(secs => ?)', [CHALLENGE_LASTS]),
  });
}

/**
 * Takes back the challenge that client data (Web Authentication, 5.8.1; base64url) say was signed, which can be done once, whatever comes
 * of the rest: `null` where it is none of ours, was answered before or too long ago, or was given to somebody else to add a passkey.
 */
export async function takeChallenge(clientData: string, { memberId, purpose }: Asked, knex: Knex): Promise<WebauthnChallenge | null> {
  const challenge = challengeIn(clientData);
  if (challenge === null) return null;
  const [taken] = await WebauthnChallenge.query(knex)
    .delete()
    .where({ challenge, purpose })
    .modify((query) => {
      if (memberId !== null) void query.where({ memberId });
    })
    .whereRaw('expires_at > now()')
    .returning('*');
  return taken ?? null;
}

function challengeIn(clientData: string): string | null {
  try {
    return ClientData.parse(JSON.parse(Buffer.from(clientData, 'base64url').toString('utf8'))).challenge;
  } catch {
    return null;
  }
}
