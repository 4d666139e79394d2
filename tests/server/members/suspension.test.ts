import { describe, expect, test } from 'vitest';
import { MemberPage } from '#contract/admin.ts';
import { LinkToken } from '#db/models/link-token.ts';
import { Member } from '#db/models/member.ts';
import { Notice } from '#db/models/notice.ts';
import { PASSWORD, usePeople } from '#tests/support/people.ts';
import { pathsOf, problemOf } from '#tests/support/problem.ts';
import { ageProof, signedInFully } from '#tests/support/second-factors.ts';

const people = usePeople();
type Browser = ReturnType<typeof people.browser>;

async function addRegistrar() {
  const registrar = await people.addMember({ role: 'registrar', authenticator: true, displayName: 'Una Test' });
  return { registrar, browser: await signedInFully(people, registrar) };
}

const REASON = 'Entered the same casting forty times';

function suspend(browser: Browser, id: string, version = 1, reason = REASON) {
  return browser.post(`/api/admin/members/${id}/suspend`).send({ reason, version });
}

function unsuspend(browser: Browser, id: string, version = 2) {
  return browser.post(`/api/admin/members/${id}/unsuspend`).send({ reason: 'They wrote and explained', version });
}

describe('suspending a member', () => {
  test('ends their sessions at once, voids their links, tells them why and is written down', async () => {
    const { registrar, browser } = await addRegistrar();
    const member = await people.addMember();
    const own = await people.signedIn(member);
    await people.browser().post('/api/password/forgot').send({ email: member.email }).expect(200);
    const page = MemberPage.parse((await suspend(browser, member.id).expect(200)).body);
    expect(page).toMatchObject({ state: 'suspended', version: 2, suspension: { reason: REASON, by: 'Una Test' } });
    expect(page.can).toEqual({ changeRole: true, suspend: false, unsuspend: true, endSessions: true });
    expect((await own.get('/api/me')).body).toEqual({ me: null });
    await problemOf(own.get('/api/me/sessions'), 401);
    await problemOf(people.browser().post('/api/sign-in').send({ email: member.email, password: PASSWORD }), 403);
    expect(await LinkToken.query(people.knex).where({ memberId: member.id })).toEqual([]);
    expect((await people.lettersTo(member.email))[0]).toMatchObject({ template: 'suspended', data: { reason: REASON } });
    expect(await Notice.query(people.knex).where({ memberId: member.id })).toMatchObject([{ kind: 'account', title: 'Your account was suspended', body: REASON }]);
    expect((await people.actsOf(member.id)).find(({ act }) => act === 'member.suspended')).toMatchObject({ actorId: registrar.id, detail: { reason: REASON } });
  });

  test('writes no letter to an address that was never confirmed', async () => {
    const { browser } = await addRegistrar();
    const member = await people.addMember({ verified: false });
    await suspend(browser, member.id).expect(200);
    expect(await people.lettersTo(member.email)).toEqual([]);
  });

  test('takes a registrar’s rights in the middle of a session', async () => {
    const { browser } = await addRegistrar();
    const second = await addRegistrar();
    const member = await people.addMember();
    await suspend(browser, second.registrar.id).expect(200);
    await problemOf(suspend(second.browser, member.id), 404);
    expect(await Member.query(people.knex).findById(member.id)).toMatchObject({ suspendedAt: null });
  });

  test('is refused of oneself, twice, of an older version, without a reason or a recent proof', async () => {
    const { registrar, browser } = await addRegistrar();
    const member = await people.addMember();
    await problemOf(suspend(browser, registrar.id), 403);
    await problemOf(suspend(browser, member.id, 7), 409);
    expect(pathsOf(await problemOf(suspend(browser, member.id, 1, '  '), 422))).toEqual(['reason']);
    await suspend(browser, member.id).expect(200);
    await problemOf(suspend(browser, member.id, 2), 409);
    await ageProof(registrar.id, people.knex);
    expect((await problemOf(unsuspend(browser, member.id), 403)).type).toBe('/problems/identity-not-confirmed');
  });
});

describe('lifting a suspension', () => {
  test('lets the member sign in again and tells them', async () => {
    const { browser } = await addRegistrar();
    const member = await people.addMember();
    await suspend(browser, member.id).expect(200);
    const page = MemberPage.parse((await unsuspend(browser, member.id).expect(200)).body);
    expect(page).toMatchObject({ state: 'active', suspension: null, version: 3 });
    expect((await people.lettersTo(member.email))[0]).toMatchObject({ template: 'unsuspended' });
    const own = await people.signedIn(member);
    expect((await own.get('/api/me')).body).toMatchObject({ me: { unreadNotices: 2 } });
    expect((await people.actsOf(member.id)).find(({ act }) => act === 'member.unsuspended')).toMatchObject({ detail: { reason: 'They wrote and explained' } });
    await problemOf(unsuspend(browser, member.id, 3), 409);
  });
});

describe('ending the sessions of a member', () => {
  test('ends all of them at once, and is written down', async () => {
    const { registrar, browser } = await addRegistrar();
    const member = await people.addMember();
    const browsers = [await people.signedIn(member), await people.signedIn(member)];
    await browser.post(`/api/admin/members/${member.id}/end-sessions`).send().expect(200);
    for (const own of browsers) expect((await own.get('/api/me')).body).toEqual({ me: null });
    expect((await people.actsOf(member.id)).at(-1)).toMatchObject({ act: 'session.ended', actorId: registrar.id, detail: { sessions: 2 } });
    await people.signedIn(member);
  });

  test('is refused of one’s own', async () => {
    const { registrar, browser } = await addRegistrar();
    await problemOf(browser.post(`/api/admin/members/${registrar.id}/end-sessions`).send(), 403);
  });
});
