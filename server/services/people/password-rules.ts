import { dictionary } from '@zxcvbn-ts/language-common';
import { PASSWORD_LIMITS } from '#contract/people.ts';
import { ProblemError } from '#server/services/problem-error.ts';

const COMMON: ReadonlySet<string> = new Set(dictionary['passwords-common']);

const SITE_NAME = 'pourbook';
/** Over and over, so few characters are guessed whichever they are. */
const SHORT_UNIT = 3;
/** Shorter pieces of a name or an address are found in too many good passwords. */
const LEAST_OWN_WORD = 4;
/** What must be left of a password once the member's own words are taken out of it. */
const LEAST_LEFT = 8;

const NOT_LETTER_OR_DIGIT = /[^\p{L}\p{N}]+/u;

/** Whose password it is to be. */
export type PasswordOwner = { readonly displayName: string; readonly email: string; readonly hasSecondFactor: boolean };

/**
 * NIST SP 800-63B-4, 3.1.1.2: length in characters, none of composition, and not one that whoever guesses would try first.
 *
 * @throws ProblemError `invalid` at `field` saying why.
 */
export function refuseWeakPassword(password: string, owner: PasswordOwner, field: string): void {
  const message = faultOf(password, owner);
  if (message !== null) throw new ProblemError('invalid', 'See which, and why, under errors.', { errors: [{ path: [field], message }] });
}

function faultOf(password: string, owner: PasswordOwner): string | null {
  const least = owner.hasSecondFactor ? PASSWORD_LIMITS.withSecondFactor : PASSWORD_LIMITS.alone;
  const { length } = [...password];
  if (length < least) return `At least ${least} characters`;
  if (length > PASSWORD_LIMITS.most) return `At most ${PASSWORD_LIMITS.most} characters`;
  if (isCommon(password.toLowerCase())) return 'Among the passwords that are guessed first; choose another';
  if (isOwn(password, owner)) return 'Little more than your name, your address or ours; choose another';
  return null;
}

/** A password of the list, by itself or over and over; or a few characters over and over. */
function isCommon(password: string): boolean {
  for (let length = 1; length <= password.length; length += 1) {
    const unit = password.slice(0, length);
    if ((length <= SHORT_UNIT || COMMON.has(unit)) && password === unit.repeat(Math.ceil(password.length / length)).slice(0, password.length)) return true;
  }
  return false;
}

function isOwn(password: string, { displayName, email }: PasswordOwner): boolean {
  let left = plain(password);
  const words = [displayName, email, ...email.split('@'), ...displayName.split(NOT_LETTER_OR_DIGIT), ...email.split(NOT_LETTER_OR_DIGIT), SITE_NAME]
    .map(plain)
    .filter((word) => word.length >= LEAST_OWN_WORD)
    .toSorted((one, other) => other.length - one.length);
  const before = left;
  for (const word of words) left = left.replaceAll(word, '');
  return left !== before && left.length < LEAST_LEFT;
}

function plain(text: string): string {
  return text.normalize('NFKC').toLowerCase().split(NOT_LETTER_OR_DIGIT).join('');
}
