import type { Knex } from 'knex';
import { Passkey } from '#db/models/passkey.ts';

/** A member's passkeys, the oldest first. */
export async function listPasskeys(memberId: string, knex: Knex): Promise<readonly Passkey[]> {
  return Passkey.query(knex).where({ memberId }).orderBy(['addedAt', 'id']);
}
