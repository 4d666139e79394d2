import type { Knex } from 'knex';
import { Secret, TOTP } from 'otpauth';
import { z } from 'zod';
import { Authenticator } from '#db/models/authenticator.ts';

/** RFC 6238 with what authenticators everywhere take: SHA-1, six digits, steps of thirty seconds. */
export const AUTHENTICATOR = { algorithm: 'SHA1', digits: 6, period: 30 } as const;

/** The library compares bytes, so it fails on digits of other scripts. */
const CODE = /^[0-9]{6}$/;

/** Steps to either side that a device's clock may be off. */
const TOLERANCE = 1;

const Epoch = z.object({ milliseconds: z.number() });

/**
 * Whether a code is the member's authenticator's own, by the database's clock. A code that is taken is used up, and so is every
 * earlier one.
 */
export async function checkAuthenticatorCode(memberId: string, code: string, trx: Knex.Transaction): Promise<boolean> {
  const authenticator = await Authenticator.query(trx).findById(memberId).whereNotNull('confirmedAt').forUpdate();
  if (!authenticator) return false;
  const step = await stepOfCode(authenticator.secret, code, trx);
  if (step === null || BigInt(step) <= BigInt(authenticator.lastStep ?? 0)) return false;
  await authenticator.$query(trx).patch({ lastStep: String(step) });
  return true;
}

/** The time step a code belongs to, if it is one of now; spaces in it count for nothing. */
export async function stepOfCode(secret: string, code: string, knex: Knex): Promise<number | null> {
  const token = code.replaceAll(/\s/g, '');
  if (!CODE.test(token)) return null;
  const row: unknown = await knex.first(knex.raw('extract(epoch from clock_timestamp()) * 1000 as milliseconds'));
  const timestamp = Epoch.parse(row).milliseconds;
  const totp = new TOTP({ ...AUTHENTICATOR, secret: Secret.fromBase32(secret) });
  const delta = totp.validate({ token, timestamp, window: TOLERANCE });
  return delta === null ? null : Math.floor(timestamp / (AUTHENTICATOR.period * 1_000)) + delta;
}
