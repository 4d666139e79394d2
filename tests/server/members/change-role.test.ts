import { describe, expect, test } from 'vitest';
import { MemberPage } from '#contract/admin.ts';
import { AuditRow } from '#db/models/audit-row.ts';
import { MemberScope } from '#db/models/member-scope.ts';
import { Member } from '#db/models/member.ts';
import { Notice } from '#db/models/notice.ts';
import { Session } from '#db/models/session.ts';
import { sessionOf, usePeople } from '#tests/support/people.ts';
import { pathsOf, problemOf } from '#tests/support/problem.ts';
import { ageProof, signedInFully } from '#tests/support/second-factors.ts';

const people = usePeople();
type Browser = ReturnType<typeof people.browser>;
type Change = { role: string; moderates?: readonly string[] | null; version?: number };

async function addRegistrar() {
  const registrar = await people.addMember({ role: 'registrar', authenticator: true });
  return { registrar, browser: await signedInFully(people, registrar) };
}

function put(browser: Browser, id: string, { role, moderates = null, version = 1 }: Change) {
  return browser.put(`/api/admin/members/${id}/role`).send({ role, moderates, version });
}

/** Those of the demo and of other tests are members from here on. */
async function leaveRegistrars(ids: readonly string[]): Promise<void> {
  await Member.query(people.knex).whereNotIn('id', [...ids]).where({ role: 'registrar' }).patch({ role: 'member' });
}

describe('changing a role', () => {
  test('gives it with its makers, tells the member, ends their sessions and is written down', async () => {
    const { registrar, browser } = await addRegistrar();
    const member = await people.addMember();
    const own = await people.signedIn(member);
    const moderates = ['brackwater-tractor-works'];
    const answer = await put(browser, member.id, { role: 'moderator', moderates }).expect(200);
    const page = MemberPage.parse(answer.body);
    expect(page).toMatchObject({ role: 'moderator', moderates: [{ slug: 'brackwater-tractor-works' }], version: 2 });
    expect((await own.get('/api/me')).body).toEqual({ me: null });
    expect((await people.lettersTo(member.email))[0]).toMatchObject({
      template: 'role-changed',
      data: { role: 'moderator', moderates: [page.moderates?.[0]?.name] },
    });
    expect(await Notice.query(people.knex).where({ memberId: member.id })).toMatchObject([{ kind: 'role', title: 'You are a moderator now', href: '/account' }]);
    expect((await people.actsOf(member.id)).at(-1)).toMatchObject({
      act: 'role.changed',
      actorId: registrar.id,
      detail: { from: 'member', to: 'moderator', moderates: ['brackwater-tractor-works'] },
      requestId: answer.headers['x-request-id'],
    });
  });

  test('widens a scope to all makers, and takes it away', async () => {
    const { browser } = await addRegistrar();
    const member = await people.addMember();
    await put(browser, member.id, { role: 'moderator', moderates: ['brackwater-tractor-works'] }).expect(200);
    const all = await put(browser, member.id, { role: 'moderator', version: 2 }).expect(200);
    expect(all.body).toMatchObject({ moderates: null, version: 3 });
    expect(await MemberScope.query(people.knex).where({ memberId: member.id })).toEqual([]);
    const none = await put(browser, member.id, { role: 'member', moderates: [], version: 3 }).expect(200);
    expect(none.body).toMatchObject({ role: 'member', moderates: [], version: 4 });
    expect((await people.lettersTo(member.email))[0]).toMatchObject({ data: { role: 'member', moderates: null } });
  });

  test.each<[string, Change, string[]]>([
    ['makers for a member', { role: 'member', moderates: ['brackwater-tractor-works'] }, ['moderates']],
    ['no makers for a moderator', { role: 'moderator', moderates: [] }, ['moderates']],
    ['makers that are none', { role: 'moderator', moderates: ['brackwater-tractor-works', 'nobody-at-all'] }, ['moderates.1']],
    ['a role that is none', { role: 'owner' }, ['role']],
  ])('refuses %s', async (_what, change, paths) => {
    const { browser } = await addRegistrar();
    const member = await people.addMember();
    expect(pathsOf(await problemOf(put(browser, member.id, change), 422))).toEqual(paths);
    expect(await Member.query(people.knex).findById(member.id)).toMatchObject({ role: 'member', version: 1 });
    expect(await people.actsOf(member.id)).toEqual([]);
  });

  test('takes a maker named twice for one', async () => {
    const { browser } = await addRegistrar();
    const member = await people.addMember();
    const twice = ['brackwater-tractor-works', 'brackwater-tractor-works'];
    expect((await put(browser, member.id, { role: 'moderator', moderates: twice }).expect(200)).body).toMatchObject({ moderates: [{ slug: twice[0] }] });
  });

  test('is refused where another registrar was quicker, and of two at once one has it', async () => {
    const one = await addRegistrar();
    const other = await addRegistrar();
    const member = await people.addMember();
    await put(one.browser, member.id, { role: 'moderator' }).expect(200);
    await problemOf(put(other.browser, member.id, { role: 'registrar' }), 409);
    const both = await Promise.all([one, other].map(({ browser }) => put(browser, member.id, { role: 'member', version: 2 })));
    expect(both.map(({ status }) => status).toSorted()).toEqual([200, 409]);
  });

  test('is refused of an account that is closed or was never confirmed', async () => {
    const { browser } = await addRegistrar();
    const unverified = await people.addMember({ verified: false });
    await problemOf(put(browser, unverified.id, { role: 'moderator' }), 409);
    const closed = await people.addMember();
    await Member.query(people.knex)
      .findById(closed.id)
      .patch({ email: null, passwordHash: null, emailVerifiedAt: null, displayName: 'a former member', closedAt: '2026-02-01T00:00:00Z' });
    await problemOf(put(browser, closed.id, { role: 'moderator' }), 409);
  });

  test('asks for a recent proof', async () => {
    const { registrar, browser } = await addRegistrar();
    const member = await people.addMember();
    await ageProof(registrar.id, people.knex);
    expect((await problemOf(put(browser, member.id, { role: 'moderator' }), 403)).type).toBe('/problems/identity-not-confirmed');
    expect(await Member.query(people.knex).findById(member.id)).toMatchObject({ role: 'member' });
  });
});

describe('a role taken away', () => {
  test('is gone with the next request of a session under way', async () => {
    const { browser } = await addRegistrar();
    const second = await addRegistrar();
    await second.browser.get('/api/admin/members').expect(200);
    await put(browser, second.registrar.id, { role: 'member' }).expect(200);
    await problemOf(second.browser.get('/api/admin/members'), 404);
    await problemOf(put(second.browser, second.registrar.id, { role: 'registrar', version: 2 }), 404);
  });

  test('is gone even where the session was left', async () => {
    const { registrar, browser } = await addRegistrar();
    await addRegistrar();
    await Member.query(people.knex).findById(registrar.id).patch({ role: 'member' });
    await problemOf(browser.get('/api/admin/audit'), 404);
  });

  test('may be one’s own, which signs one out', async () => {
    const { registrar, browser } = await addRegistrar();
    await addRegistrar();
    const answer = await put(browser, registrar.id, { role: 'member' }).expect(200);
    expect(MemberPage.parse(answer.body)).toMatchObject({
      role: 'member',
      can: { changeRole: false, suspend: false, unsuspend: false, endSessions: false },
    });
    expect(sessionOf(browser)).toBeUndefined();
    expect((await browser.get('/api/me')).body).toEqual({ me: null });
  });
});

describe('the last registrar', () => {
  test('stays one', async () => {
    const { registrar, browser } = await addRegistrar();
    await leaveRegistrars([registrar.id]);
    expect((await browser.get(`/api/admin/members/${registrar.id}`).expect(200)).body).toMatchObject({ can: { changeRole: false, suspend: false } });
    await problemOf(put(browser, registrar.id, { role: 'member' }), 409);
    await problemOf(browser.post(`/api/admin/members/${registrar.id}/suspend`).send({ reason: 'Because', version: 1 }), 403);
    expect(await Member.query(people.knex).findById(registrar.id)).toMatchObject({ role: 'registrar', suspendedAt: null });
  });

  test('is left when two unmake each other at once', async () => {
    for (let round = 0; round < 3; round += 1) {
      const one = await addRegistrar();
      const other = await addRegistrar();
      await leaveRegistrars([one.registrar.id, other.registrar.id]);
      const answers = await Promise.all([
        put(one.browser, other.registrar.id, { role: 'member' }),
        put(other.browser, one.registrar.id, { role: 'member' }),
      ]);
      expect(answers.filter(({ status }) => status === 200)).toHaveLength(1);
      const left = await Member.query(people.knex).where({ role: 'registrar' });
      expect(left).toHaveLength(1);
      const acts = await AuditRow.query(people.knex).where({ act: 'role.changed' }).whereIn('subjectId', [one.registrar.id, other.registrar.id]);
      expect(acts).toHaveLength(1);
      expect(await Session.query(people.knex).whereIn('memberId', [one.registrar.id, other.registrar.id]).resultSize()).toBe(1);
    }
  });

  test('is left when two step down at once', async () => {
    const one = await addRegistrar();
    const other = await addRegistrar();
    await leaveRegistrars([one.registrar.id, other.registrar.id]);
    const answers = await Promise.all([one, other].map(({ registrar, browser }) => put(browser, registrar.id, { role: 'member' })));
    expect(answers.map(({ status }) => status).toSorted()).toEqual([200, 409]);
    expect(await Member.query(people.knex).where({ role: 'registrar' }).resultSize()).toBe(1);
  });
});
