import { createHash } from 'node:crypto';
import { describe, expect, test } from 'vitest';
import { ZodError } from 'zod';
import { Member } from '#db/models/member.ts';
import { Notice } from '#db/models/notice.ts';
import { MAIL_STATES } from '#db/vocabulary.ts';
import { NOTICE_KINDS } from '#domain/vocabulary.ts';
import { chooseNotices, readNoticeChoices } from '#server/services/notices/notice-choices.ts';
import { eraseNoticesOf } from '#server/services/notices/erase-notices-of.ts';
import { notify } from '#server/services/notices/notify.ts';
import { usePeople } from '#tests/support/people.ts';

const people = usePeople();
const NOTICE = { kind: 'contribution', title: 'Your contribution was entered', body: 'With a note.', href: '/castings/brackwater-b4406' } as const;

function tell(memberId: string, notice: Partial<Parameters<typeof notify>[0]> = {}): Promise<void> {
  return people.knex.transaction((trx) => notify({ ...NOTICE, memberId, ...notice }, trx));
}

describe('telling a member something', () => {
  test('writes a notice and, for a kind that comes by e-mail, a letter that can be unsubscribed from', async () => {
    const member = await people.addMember();
    await tell(member.id);
    expect(await Notice.query(people.knex).where({ memberId: member.id })).toEqual([expect.objectContaining({ ...NOTICE, readAt: null })]);
    const [letter] = await people.lettersTo(member.email);
    expect(letter).toMatchObject({ memberId: member.id, template: 'notice', noticeKind: 'contribution', data: { ...NOTICE } });
    const token = String(letter!.data!['unsubscribeToken']);
    expect(token).toMatch(/^[A-Za-z0-9_-]{43}$/);
    expect(letter!.unsubscribeHash).toEqual(createHash('sha256').update(token).digest());
  });

  test('leaves nothing when its transaction rolls back', async () => {
    const member = await people.addMember();
    const failed = people.knex.transaction(async (trx) => {
      await notify({ ...NOTICE, memberId: member.id }, trx);
      throw new Error('changed our mind');
    });
    await expect(failed).rejects.toThrow('changed our mind');
    expect(await Notice.query(people.knex).where({ memberId: member.id })).toEqual([]);
    expect(await people.lettersTo(member.email)).toEqual([]);
  });

  test('obeys what the member chose, kind by kind', async () => {
    const member = await people.addMember();
    await people.knex.transaction((trx) => chooseNotices(member.id, { contribution: false, recomputed: true }, trx));
    await tell(member.id);
    expect(await people.lettersTo(member.email)).toEqual([]);
    await tell(member.id, { kind: 'recomputed' });
    expect((await people.lettersTo(member.email)).map(({ noticeKind }) => noticeKind)).toEqual(['recomputed']);
    expect(await Notice.query(people.knex).where({ memberId: member.id }).resultSize()).toBe(2);
  });

  test.each([
    ['whose address is not confirmed', { emailVerifiedAt: null }],
    ['who is suspended', { suspendedAt: '2026-11-01T00:00:00Z', suspensionReason: 'Because.' }],
  ])('sends no letter to a member %s', async (_which, patch) => {
    const registrar = await people.addMember({ role: 'registrar' });
    const member = await people.addMember();
    await Member.query(people.knex)
      .findById(member.id)
      .patch({ ...patch, ...('suspendedAt' in patch ? { suspendedById: registrar.id } : {}) });
    await tell(member.id);
    expect(await people.lettersTo(member.email)).toEqual([]);
    expect(await Notice.query(people.knex).where({ memberId: member.id }).resultSize()).toBe(1);
  });

  test.each(['//elsewhere.example', '/\\elsewhere.example', 'https://elsewhere.example/', 'javascript:alert(1)', '/a\r\nb'])(
    'refuses to lead to %j',
    async (href) => {
      const member = await people.addMember();
      await expect(tell(member.id, { href })).rejects.toThrow(ZodError);
      expect(await Notice.query(people.knex).where({ memberId: member.id }).resultSize()).toBe(0);
    },
  );

  test.each(['//elsewhere.example', '/\\elsewhere.example', 'https://elsewhere.example/', '/a\nb'])('the database refuses %j as well', async (href) => {
    const member = await people.addMember();
    const insert = Notice.query(people.knex).insert({ id: member.id, memberId: member.id, kind: 'role', title: 'T', body: 'B', href });
    await expect(insert).rejects.toMatchObject({ nativeError: { code: '23514' } });
  });

  test('is forgotten with the account', async () => {
    const member = await people.addMember();
    await tell(member.id);
    await people.knex.transaction(async (trx) => {
      await chooseNotices(member.id, { contribution: false }, trx);
      await eraseNoticesOf(member.id, trx);
    });
    expect(await Notice.query(people.knex).where({ memberId: member.id }).resultSize()).toBe(0);
    expect((await readNoticeChoices(member.id, people.knex)).contribution).toBe(true);
  });

  test('knows the same kinds in the register’s words and in the database’s checks', async () => {
    const member = await people.addMember();
    for (const kind of NOTICE_KINDS) await tell(member.id, { kind });
    const other = Notice.query(people.knex).insert({ id: member.id, memberId: member.id, kind: 'other' as never, title: 'T', body: 'B', href: null });
    await expect(other).rejects.toMatchObject({ nativeError: { code: '23514' } });
    const check: unknown = await people.knex.raw(
      `select pg_get_constraintdef(oid) as text from pg_constraint where conname = 'mail_messages_state_check'`,
    );
    for (const state of MAIL_STATES) expect(JSON.stringify(check)).toContain(`'${state}'`);
  });
});
