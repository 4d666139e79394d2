import { Secret, TOTP } from 'otpauth';
import { describe, expect, test } from 'vitest';
import { Authenticator } from '#db/models/authenticator.ts';
import { AUTHENTICATOR, checkAuthenticatorCode, stepOfCode } from '#server/services/second-factors/check-authenticator-code.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { TOTP_SECRET, usePeople } from '#tests/support/people.ts';
import { codeOfStep, inOneStep } from '#tests/support/second-factors.ts';

const people = usePeople();

/** RFC 6238, appendix B: SHA-1, eight digits, the secret the ASCII text `12345678901234567890`. */
const APPENDIX_B = [
  [59, '94287082'],
  [1_111_111_109, '07081804'],
  [1_111_111_111, '14050471'],
  [1_234_567_890, '89005924'],
  [2_000_000_000, '69279037'],
  [20_000_000_000, '65353130'],
] as const;

describe('codes of an authenticator', () => {
  test.each(APPENDIX_B)('at %d s are those of RFC 6238, appendix B, with six of its eight digits', (seconds, code) => {
    const secret = new Secret({ buffer: new TextEncoder().encode('12345678901234567890').buffer });
    expect(secret.base32).toBe(TOTP_SECRET);
    const timestamp = seconds * 1_000;
    expect(new TOTP({ ...AUTHENTICATOR, digits: 8, secret }).generate({ timestamp })).toBe(code);
    // RFC 4226, 5.3: fewer digits are the last ones of the same number.
    expect(new TOTP({ ...AUTHENTICATOR, secret }).generate({ timestamp })).toBe(code.slice(-6));
    expect(codeOfStep(Math.floor(seconds / 30))).toBe(code.slice(-6));
  });

  test.each([
    [-2, null],
    [-1, -1],
    [0, 0],
    [1, 1],
    [2, null],
  ])('of %d steps from now count as %s', async (offset, taken) => {
    const found = await inOneStep(people.knex, async (step) => {
      const ofCode = await stepOfCode(TOTP_SECRET, codeOfStep(step + offset), people.knex);
      return ofCode === null ? null : ofCode - step;
    });
    expect(found).toBe(taken);
  });

  test.each(['', '12345', '1234567', 'abcdef', '٠١٢٣٤٥'])('are not %j', async (code) => {
    expect(await stepOfCode(TOTP_SECRET, code, people.knex)).toBeNull();
  });

  test('may be written with a space', async () => {
    await inOneStep(people.knex, async (step) => {
      const code = codeOfStep(step);
      expect(await stepOfCode(TOTP_SECRET, `${code.slice(0, 3)} ${code.slice(3)}`, people.knex)).not.toBeNull();
    });
  });

  test('are used up, and so are those before them', async () => {
    const member = await people.addMember({ authenticator: true });
    const check = (code: string) => withTransaction(people.knex, (trx) => checkAuthenticatorCode(member.id, code, trx));
    const answers = await inOneStep(people.knex, async (step) => {
      await Authenticator.query(people.knex).findById(member.id).patch({ lastStep: '0' });
      return [
        await check(codeOfStep(step)),
        await check(codeOfStep(step)),
        await check(codeOfStep(step - 1)),
        await check(codeOfStep(step + 1)),
        await check(codeOfStep(step + 1)),
      ];
    });
    expect(answers).toEqual([true, false, false, true, false]);
  });

  test('of an authenticator that was never confirmed are none', async () => {
    const member = await people.addMember();
    await Authenticator.query(people.knex).insert({ memberId: member.id, secret: TOTP_SECRET });
    const taken = await inOneStep(people.knex, (step) => withTransaction(people.knex, (trx) => checkAuthenticatorCode(member.id, codeOfStep(step), trx)));
    expect(taken).toBe(false);
  });
});
