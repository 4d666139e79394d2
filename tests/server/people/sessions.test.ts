import type supertest from 'supertest';
import { afterEach, describe, expect, test, vi } from 'vitest';
import type { z } from 'zod';
import { listSessions } from '#contract/accounts.ts';
import { Member } from '#db/models/member.ts';
import { Session } from '#db/models/session.ts';
import { deleteEndedSessions, endSessionsOf } from '#server/services/people/sessions.ts';
import { PASSWORD, sessionOf, usePeople } from '#tests/support/people.ts';

const people = usePeople();
const MINUTE = 60;
const HOUR = 60 * MINUTE;
const DAY = 24 * HOUR;

afterEach(() => {
  vi.useRealTimers();
});

/** Lets time pass for a member's sessions alone. */
async function age(memberId: string, columns: readonly ('startedAt' | 'lastSeenAt' | 'confirmedAt')[], seconds: number): Promise<void> {
  const { knex } = people;
  const earlier = columns.map((column) => [column, knex.raw('?? - make_interval(secs => ?)', [column, seconds])] as const);
  await knex('sessions').where({ memberId }).update(Object.fromEntries(earlier));
}

async function sessionsSeen(browser: supertest.Agent): Promise<z.infer<typeof listSessions.answer>['items']> {
  const response = await browser.get('/api/me/sessions').expect(200);
  return listSessions.answer.parse(response.body).items;
}

const ALL = ['startedAt', 'lastSeenAt', 'confirmedAt'] as const;

describe('the list of sessions', () => {
  test('has one’s own, the one in use marked', async () => {
    const member = await people.addMember();
    await people.signedIn(await people.addMember());
    await people.signedIn(member);
    const browser = await people.signedIn(member);
    const items = await sessionsSeen(browser);
    expect(items).toHaveLength(2);
    expect(items.map(({ current }) => current).sort()).toEqual([false, true]);
    const stored = await Session.query(people.knex).where({ memberId: member.id });
    expect(items.map(({ id }) => id).sort()).toEqual(stored.map(({ publicId }) => publicId).sort());
    expect(JSON.stringify(items)).not.toContain(stored[0]?.id);
  });

  test('is nobody’s for a visitor', async () => {
    await people.browser().get('/api/me/sessions').expect(401);
  });

  test('leaves out those that ended by themselves', async () => {
    const member = await people.addMember();
    await people.signedIn(member);
    await age(member.id, ALL, 8 * DAY);
    const browser = await people.signedIn(member);
    expect(await sessionsSeen(browser)).toHaveLength(1);
  });
});

describe('ending a session', () => {
  test('ends another of one’s own at once and writes it down', async () => {
    const member = await people.addMember();
    const here = await people.signedIn(member);
    const there = await people.signedIn(member);
    const other = (await sessionsSeen(here)).find(({ current }) => !current)!;
    await here.delete(`/api/me/sessions/${other.id}`).expect(200, { done: true });
    await there.get('/api/me/sessions').expect(401);
    await here.get('/api/me/sessions').expect(200);
    expect((await people.actsOf(member.id)).at(-1)).toMatchObject({ act: 'session.ended', actorId: member.id, detail: { sessions: 1 } });
  });

  test('ends this one and forgets its cookie', async () => {
    const browser = await people.signedIn(await people.addMember());
    const [here] = await sessionsSeen(browser);
    const response = await browser.delete(`/api/me/sessions/${here!.id}`).expect(200);
    expect(response.headers['set-cookie']?.[0]).toMatch(/^session=; Path=\/; Expires=Thu, 01 Jan 1970/);
    await browser.get('/api/me/sessions').expect(401);
  });

  test('is refused for another member’s as for one that is not', async () => {
    const owner = await people.addMember();
    const owners = await people.signedIn(owner);
    const { publicId } = await Session.query(people.knex).findOne({ memberId: owner.id }).throwIfNotFound();
    for (const role of ['member', 'moderator', 'registrar'] as const) {
      const browser = await people.signedIn(await people.addMember({ role }));
      const foreign = await browser.delete(`/api/me/sessions/${publicId}`).expect(404);
      const absent = await browser.delete('/api/me/sessions/0199aaaa-0000-7000-8000-000000000000').expect(404);
      expect({ ...foreign.body, requestId: '' }).toEqual({ ...absent.body, requestId: '' });
    }
    await people.browser().delete(`/api/me/sessions/${publicId}`).expect(401);
    await owners.get('/api/me/sessions').expect(200);
  });

  test('ends all others and leaves this one', async () => {
    const member = await people.addMember();
    const stranger = await people.signedIn(await people.addMember());
    const here = await people.signedIn(member);
    const others = [await people.signedIn(member), await people.signedIn(member)];
    await here.post('/api/me/sessions/end-others').expect(200, { done: true });
    for (const other of others) await other.get('/api/me/sessions').expect(401);
    await here.get('/api/me/sessions').expect(200);
    await stranger.get('/api/me/sessions').expect(200);
    expect((await people.actsOf(member.id)).at(-1)).toMatchObject({ act: 'session.ended', detail: { sessions: 2 } });
  });

  test.each(['', 'x', "1' or '1'='1", '%2e%2e'])('of a name that is none (%s) is refused', async (id) => {
    const browser = await people.signedIn(await people.addMember());
    expect([404, 405, 422]).toContain((await browser.delete(`/api/me/sessions/${id}`)).status);
  });
});

describe('signing out', () => {
  test('ends the session at the server, so that the cookie is worth nothing', async () => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    const cookie = `session=${String(sessionOf(browser))}`;
    const response = await browser.post('/api/sign-out').expect(200, { done: true });
    expect(response.headers['set-cookie']?.[0]).toMatch(/^session=;/);
    expect(sessionOf(browser)).toBeUndefined();
    await people.browser().get('/api/me/sessions').set('Cookie', cookie).expect(401);
    expect((await people.actsOf(member.id)).at(-1)).toMatchObject({ act: 'session.ended' });
  });

  test('in two tabs works in both and is written down once', async () => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    const cookie = `session=${String(sessionOf(browser))}`;
    const tabs = await Promise.all([1, 2].map(() => people.browser().post('/api/sign-out').set('Cookie', cookie)));
    expect(tabs.map(({ status }) => status)).toEqual([200, 200]);
    await people.browser().post('/api/sign-out').set('Cookie', cookie).expect(200);
    await people.browser().get('/api/me/sessions').set('Cookie', cookie).expect(401);
    expect(await Session.query(people.knex).where({ memberId: member.id }).resultSize()).toBe(0);
  });

  test('also gives up a sign-in whose second factor is owed', async () => {
    const member = await people.addMember({ authenticator: true });
    const browser = await people.signedIn(member);
    await browser.post('/api/sign-out').expect(200);
    expect(await Session.query(people.knex).where({ memberId: member.id }).resultSize()).toBe(0);
  });
});

describe('a session ends by itself', () => {
  test.each([
    ['of a member, unused for seven days', 'member', ALL, 7 * DAY],
    ['of a moderator, unused for half an hour', 'moderator', ALL, 30 * MINUTE],
    ['of a registrar, unused for half an hour', 'registrar', ALL, 30 * MINUTE],
    ['of a member, thirty days old however much used', 'member', ['startedAt'], 30 * DAY],
    ['of a moderator, twelve hours old however much used', 'moderator', ['startedAt'], 12 * HOUR],
  ] as const)('%s', async (_which, role, columns, seconds) => {
    const member = await people.addMember({ role });
    const browser = await people.signedIn(member);
    await age(member.id, columns, seconds - MINUTE);
    await browser.get('/api/me/sessions').expect(200);
    // Having been seen just now it lives on; so its time runs anew, or, where its age is what counts, does not.
    await age(member.id, columns, columns.length === 1 ? MINUTE + 1 : seconds + 1);
    await browser.get('/api/me/sessions').expect(401);
    expect(await Session.query(people.knex).where({ memberId: member.id }).resultSize()).toBe(0);
  });

  test('where its second factor is owed, after ten minutes', async () => {
    const member = await people.addMember({ authenticator: true });
    await people.signedIn(member);
    await age(member.id, ALL, 10 * MINUTE - 10);
    await people.knex.transaction((trx) => deleteEndedSessions(trx));
    expect(await Session.query(people.knex).where({ memberId: member.id }).resultSize()).toBe(1);
    await age(member.id, ALL, 11);
    await people.knex.transaction((trx) => deleteEndedSessions(trx));
    expect(await Session.query(people.knex).where({ memberId: member.id }).resultSize()).toBe(0);
  });

  test('and is seen to the minute while it is used', async () => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    await age(member.id, ALL, 2 * HOUR);
    await browser.get('/api/me').expect(200);
    const seen = await Session.query(people.knex)
      .findOne({ memberId: member.id })
      .whereRaw(`last_seen_at > now() - interval '5 seconds'`);
    expect(seen).toBeDefined();
  });
});

describe('a server whose clock is wrong', () => {
  test.each([
    ['an hour fast', HOUR],
    ['an hour slow', -HOUR],
    ['forty days fast', 40 * DAY],
    ['forty days slow', -40 * DAY],
  ])('(%s) neither ends sessions early nor lets them live longer', async (_how, skew) => {
    const member = await people.addMember({ role: 'moderator' });
    vi.useFakeTimers({ toFake: ['Date'], now: Date.now() + skew * 1_000 });
    const browser = await people.signedIn(member);
    await browser.get('/api/me/sessions').expect(200);
    await age(member.id, ALL, 29 * MINUTE);
    await browser.get('/api/me/sessions').expect(200);
    await age(member.id, ALL, 30 * MINUTE + 1);
    await browser.get('/api/me/sessions').expect(401);
  });

  test('writes down the times of the database', async () => {
    const member = await people.addMember();
    vi.useFakeTimers({ toFake: ['Date'], now: Date.now() + HOUR * 1_000 });
    await people.signedIn(member);
    const session = Session.query(people.knex).findOne({ memberId: member.id });
    expect(await session.whereRaw(`started_at between now() - interval '1 minute' and now()`)).toBeDefined();
    const [act] = await people.actsOf(member.id);
    const { rows } = await people.knex.raw<{ rows: { fresh: boolean }[] }>(
      `select at between now() - interval '1 minute' and now() as fresh from audit_rows where id = ?`,
      [act!.id],
    );
    expect(rows).toEqual([{ fresh: true }]);
  });
});

describe('what a registrar does to a member', () => {
  test('acts on the next request: a role taken away is gone', async () => {
    const member = await people.addMember({ role: 'moderator' });
    const browser = await people.signedIn(member);
    await Session.query(people.knex).where({ memberId: member.id }).patch({ strength: 'second-factor' });
    expect((await browser.get('/api/me')).body).toMatchObject({ me: { role: 'moderator', can: { decideContributions: true } } });
    await Member.query(people.knex).findById(member.id).patch({ role: 'member', scope: 'none' });
    expect((await browser.get('/api/me')).body).toMatchObject({ me: { role: 'member', can: { decideContributions: false } } });
  });

  test('ends the sessions of somebody who is suspended, also one whose row outlived it', async () => {
    const registrar = await people.addMember({ role: 'registrar' });
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    const suspension = { suspendedAt: '2026-02-01T00:00:00Z', suspensionReason: 'Sold what was not theirs', suspendedById: registrar.id };
    await Member.query(people.knex).findById(member.id).patch(suspension);
    await browser.get('/api/me/sessions').expect(401);
    expect(await people.knex.transaction((trx) => endSessionsOf(member.id, trx))).toBe(1);
    await Member.query(people.knex).findById(member.id).patch({ suspendedAt: null, suspensionReason: null, suspendedById: null });
    await browser.get('/api/me/sessions').expect(401);
  });
});

describe('a moderator or registrar', () => {
  test.each([
    ['moderator', { decideContributions: true, seeMembers: false, seeAudit: false }],
    ['registrar', { decideContributions: false, seeMembers: true, seeAudit: true }],
  ] as const)('(%s) may act only in a session begun with a second factor', async (role, can) => {
    const member = await people.addMember({ role });
    const browser = await people.signedIn(member);
    const nothing = { decideContributions: false, seeMembers: false, seeAudit: false };
    expect((await browser.get('/api/me')).body).toMatchObject({ me: { secondFactorOwed: true, can: nothing } });
    await Session.query(people.knex).where({ memberId: member.id }).patch({ strength: 'second-factor' });
    expect((await browser.get('/api/me')).body).toMatchObject({ me: { secondFactorOwed: false, can } });
  });
});

describe('proving once more who one is', () => {
  test('with the password gives the session a new secret, and the old one dies', async () => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    const before = sessionOf(browser);
    const { publicId } = await Session.query(people.knex).findOne({ memberId: member.id }).throwIfNotFound();
    await age(member.id, ALL, 11 * MINUTE);
    await browser.get('/api/me/export').expect(403);
    await browser.post('/api/me/confirm').send({ way: 'password', password: PASSWORD }).expect(200, { done: true });
    expect(sessionOf(browser)).not.toBe(before);
    await browser.get('/api/me/export').expect(200);
    await people.browser().get('/api/me').set('Cookie', `session=${String(before)}`).expect(200, { me: null });
    expect(await Session.query(people.knex).where({ memberId: member.id })).toMatchObject([{ publicId }]);
  });

  test('does not make a session live longer in all', async () => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    await age(member.id, ['startedAt'], 30 * DAY - HOUR);
    await browser.post('/api/me/confirm').send({ way: 'password', password: PASSWORD }).expect(200);
    await age(member.id, ['startedAt'], HOUR + 1);
    await browser.get('/api/me/sessions').expect(401);
  });

  test('with a wrong password is refused at its field and written down', async () => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    const response = await browser.post('/api/me/confirm').send({ way: 'password', password: 'something else' }).expect(403);
    expect(response.body).toMatchObject({ type: '/problems/not-allowed', errors: [{ path: ['password'] }] });
    expect(response.headers['set-cookie']).toBeUndefined();
    expect((await people.actsOf(member.id)).at(-1)).toMatchObject({ act: 'session.refused', actorId: member.id });
  });

  test('is good for ten minutes, then says which problem it is', async () => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    await age(member.id, ['startedAt', 'confirmedAt'], 9 * MINUTE);
    await browser.get('/api/me/export').expect(200);
    await age(member.id, ['startedAt', 'confirmedAt'], MINUTE + 1);
    expect((await browser.get('/api/me/export').expect(403)).body).toMatchObject({ type: '/problems/identity-not-confirmed' });
  });

  test('is nothing a visitor can do', async () => {
    await people.browser().post('/api/me/confirm').send({ way: 'password', password: PASSWORD }).expect(401);
  });
});
