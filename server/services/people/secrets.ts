import { createHash, randomBytes } from 'node:crypto';

const SECRET_BYTES = 32;

/** 256 random bits, base64url: 43 characters. */
export function newSecret(): string {
  return randomBytes(SECRET_BYTES).toString('base64url');
}

/** SHA-256, hexadecimal. Enough for what is random already; a password needs more. */
export function hashOfSecret(secret: string): string {
  return createHash('sha256').update(secret).digest('hex');
}
