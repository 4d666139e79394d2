import { describe, expect, test } from 'vitest';
import { NewPassword } from '#contract/people.ts';
import { refuseWeakPassword } from '#server/services/people/password-rules.ts';
import { ProblemError } from '#server/services/problem-error.ts';

const OWNER = { displayName: 'Bryony Halt', email: 'bhalt@gearcase.example', hasSecondFactor: false };

function faultOf(password: string, owner = OWNER): string | null {
  try {
    refuseWeakPassword(password, owner, 'newPassword');
    return null;
  } catch (error) {
    if (!(error instanceof ProblemError)) throw error;
    expect(error.kind).toBe('invalid');
    expect(error.errors?.[0]?.path).toEqual(['newPassword']);
    return error.errors?.[0]?.message ?? '';
  }
}

// NIST SP 800-63B-4, 3.1.1.2: 15 characters where the password is the only factor, 8 beside another, at least 64 taken, none of composition.
describe('the length of a password', () => {
  test.each([
    [14, 'At least 15 characters'],
    [15, null],
    [128, null],
    [129, 'At most 128 characters'],
  ])('of %i characters', (length, fault) => {
    const password = 'qzjx vkwp mfyg '.repeat(10).slice(0, length - 1) + '.';
    expect([...password]).toHaveLength(length);
    expect(faultOf(password)).toBe(fault);
  });

  test.each([
    [7, 'At least 8 characters'],
    [8, null],
  ])('of %i characters beside a second factor', (length, fault) => {
    expect(faultOf('qzjx vkwp'.slice(0, length), { ...OWNER, hasSecondFactor: true })).toBe(fault);
  });

  test('counts characters and not their halves', () => {
    expect(faultOf('🔩⚙🛠🚜🔥⛓🧲📏🪛🔧🔨🪚🧰🗜')).toBe('At least 15 characters');
    expect(faultOf('🔩⚙🛠🚜🔥⛓🧲📏🪛🔧🔨🪚🧰🗜🧱')).toBeNull();
    expect(NewPassword.safeParse('🔩'.repeat(128)).success).toBe(true);
    expect(NewPassword.safeParse('🔩'.repeat(129)).success).toBe(false);
  });

  test.each(['aaaa bbbb cccc dddd', 'только кириллица здесь', '一二三四五六七八九十百千万億兆', 'no capitals no digits'])(
    'is all that is asked of its characters: %s',
    (password) => {
      expect(faultOf(password)).toBeNull();
    },
  );
});

describe('a password that is guessed first', () => {
  test.each([
    'passwordpassword',
    '123456789987654321',
    'QWERTY123456789',
    '123456123456123',
    'aaaaaaaaaaaaaaaaaa',
    'xyzxyzxyzxyzxyzx',
    'abc123abc123abc123',
    'dragondragondragon',
  ])('is refused: %s', (password) => {
    expect(faultOf(password)).toMatch(/guessed first/);
  });

  test.each(['correct horse battery staple', 'dragon by the flywheel', 'password to the gear case'])('is not one that only holds such a word: %s', (password) => {
    expect(faultOf(password)).toBeNull();
  });

  test('is refused beside a second factor too', () => {
    expect(faultOf('password1', { ...OWNER, hasSecondFactor: true })).toMatch(/guessed first/);
  });
});

describe('a password that is little more than one’s own name or address', () => {
  test.each([
    'Bryony Halt 1234',
    'bryonyhaltbryony',
    'HaltBryony-2026!',
    'bhalt@gearcase.example',
    'gearcase.example1',
    'pourbookpourbook',
    'Pourbook bryony 1',
  ])('is refused: %s', (password) => {
    expect(faultOf(password)).toMatch(/your name/);
  });

  test.each(['bryony rides a crawler at dawn', 'what pourbook says of castings'])('is not one that has more to it: %s', (password) => {
    expect(faultOf(password)).toBeNull();
  });

  test('is another’s business', () => {
    expect(faultOf('Bryony Halt 1234', { ...OWNER, displayName: 'Una Kettle', email: 'una@kettle.example' })).toBeNull();
  });
});
