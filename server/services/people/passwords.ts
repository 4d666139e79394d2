import { hash, verify } from '@node-rs/argon2';
import { createGate } from './gate.ts';

/** The package's name for argon2id is a `const enum`, which a single file can't be compiled with. */
const ARGON2ID = 2;

/**
 * argon2id (RFC 9106) with 64 MiB, three passes, one lane: some 90 ms of one core where it was measured, five times the least that
 * OWASP's cheat sheet on storing passwords asks for. A hash made with other parameters is made anew at the next sign-in.
 */
export const PASSWORD_HASHING = { algorithm: ARGON2ID, memoryCost: 65_536, timeCost: 3, parallelism: 1 } as const;

const PREFIX = `$argon2id$v=19$m=${PASSWORD_HASHING.memoryCost},t=${PASSWORD_HASHING.timeCost},p=${PASSWORD_HASHING.parallelism}$`;

/** 128 MiB at most, whatever comes in at once; the hundredth in the queue waits some five seconds. */
const enter = createGate({ atOnce: 2, waiting: 100 });

/** A hash nobody has the password of, of today's parameters: comparing with it takes as long as with a real one. */
const NOBODY = `${PREFIX}bm9ib2R5IGhhcyB0aGlz$AAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAAA`;

/** The hash of a password, in the PHC string format. */
export async function hashPassword(password: string): Promise<string> {
  return enter(() => hash(normalised(password), PASSWORD_HASHING));
}

/** Whether the password is the one behind the hash. Without a hash the answer is no, after the same work. */
export async function isPassword(password: string, passwordHash: string | null | undefined): Promise<boolean> {
  const matches = await enter(() => verify(passwordHash ?? NOBODY, normalised(password)));
  return matches && typeof passwordHash === 'string';
}

/** Whether a hash was made with parameters that are no longer ours. */
export function isOutdated(passwordHash: string): boolean {
  return !passwordHash.startsWith(PREFIX);
}

/** Keyboards write the same character in different ways; SP 800-63B asks for one form, and takes NFKC. */
function normalised(password: string): string {
  return password.normalize('NFKC');
}
