import { randomBytes } from 'node:crypto';
import type { Knex } from 'knex';
import { RecoveryCode } from '#db/models/recovery-code.ts';
import { hashOfSecret } from '#server/services/people/secrets.ts';

const CODES = 10;
const CHARACTERS = 16;
const GROUP = 4;

/** Thirty-two signs, so that each carries five random bits evenly; none that is taken for another when it is written down. */
const ALPHABET = 'ABCDEFGHJKLMNPQRSTUVWXYZ23456789';

/** Makes ten codes of 80 random bits; those before them no longer work. Only their hashes are kept, so this is when they can be read. */
export async function makeRecoveryCodes(memberId: string, trx: Knex.Transaction): Promise<readonly string[]> {
  const codes = Array.from({ length: CODES }, newCode);
  await RecoveryCode.query(trx).delete().where({ memberId });
  await RecoveryCode.query(trx).insert(codes.map((code) => ({ hash: hashOfCode(code), memberId })));
  return codes;
}

/** Codes for a first second factor: made where none are left, and none where some are, which keep working. */
export async function makeFirstRecoveryCodes(memberId: string, trx: Knex.Transaction): Promise<readonly string[]> {
  const left = await RecoveryCode.query(trx).where({ memberId }).whereNull('usedAt').resultSize();
  return left === 0 ? makeRecoveryCodes(memberId, trx) : [];
}

/** Uses up a code of the member; of many at the same time one does. However it is spaced, hyphened or cased. */
export async function takeRecoveryCode(memberId: string, code: string, trx: Knex.Transaction): Promise<boolean> {
  const taken = await RecoveryCode.query(trx)
    .where({ memberId, hash: hashOfCode(code) })
    .whereNull('usedAt')
    .patch({ usedAt: trx.raw('now()') });
  return taken === 1;
}

function newCode(): string {
  const signs = [...randomBytes(CHARACTERS)].map((byte) => ALPHABET.charAt(byte % ALPHABET.length)).join('');
  return Array.from({ length: CHARACTERS / GROUP }, (_, place) => signs.slice(place * GROUP, (place + 1) * GROUP)).join('-');
}

function hashOfCode(code: string): string {
  return hashOfSecret(code.toUpperCase().replaceAll(/[^A-Z0-9]/g, ''));
}
