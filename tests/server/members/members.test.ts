import { describe, expect, test } from 'vitest';
import { v7 as uuidV7 } from 'uuid';
import { z } from 'zod';
import { MemberItem, MemberPage } from '#contract/admin.ts';
import { Maker } from '#db/models/maker.ts';
import { MemberScope } from '#db/models/member-scope.ts';
import { Member } from '#db/models/member.ts';
import { usePeople } from '#tests/support/people.ts';
import { pathsOf, problemOf } from '#tests/support/problem.ts';
import { signedInFully } from '#tests/support/second-factors.ts';

const people = usePeople();
type Browser = ReturnType<typeof people.browser>;

const List = z.strictObject({ items: z.array(MemberItem), next: z.string().nullable(), total: z.number().optional() });

async function registrarBrowser(): Promise<Browser> {
  return signedInFully(people, await people.addMember({ role: 'registrar', authenticator: true }));
}

async function list(browser: Browser, query: Record<string, string>) {
  return List.parse((await browser.get('/api/admin/members').query(query).expect(200)).body);
}

describe('the members', () => {
  test('are found by part of their name or address, in any case', async () => {
    const browser = await registrarBrowser();
    const mark = uuidV7().slice(-8);
    const one = await people.addMember({ displayName: `Quill ${mark}` });
    const other = await people.addMember({ email: `${mark}@quarry.example` });
    const found = await list(browser, { q: mark.toUpperCase() });
    expect(found.items.map(({ id }) => id).toSorted()).toEqual([one.id, other.id].toSorted());
    expect(found.total).toBe(2);
    expect((await list(browser, { q: `${mark}-nobody` })).items).toEqual([]);
  });

  test('are searched for the very text: % and _ stand for themselves', async () => {
    const browser = await registrarBrowser();
    const literal = await people.addMember({ displayName: 'Runs 100% iron' });
    await people.addMember({ displayName: 'Runs 1000 irons' });
    expect((await list(browser, { q: '100%' })).items.map(({ id }) => id)).toEqual([literal.id]);
    expect((await list(browser, { q: '0%_' })).items).toEqual([]);
  });

  test('are told apart by role and state', async () => {
    const browser = await registrarBrowser();
    const mark = uuidV7().slice(-8);
    const displayName = `Apart ${mark}`;
    const active = await people.addMember({ displayName });
    const moderator = await people.addMember({ displayName, role: 'moderator' });
    const unverified = await people.addMember({ displayName, verified: false });
    const suspended = await people.addMember({ displayName });
    const suspension = { suspendedAt: '2026-02-01T00:00:00Z', suspensionReason: 'For a test', suspendedById: active.id };
    await Member.query(people.knex).findById(suspended.id).patch(suspension);
    const ids = async (query: Record<string, string>) => (await list(browser, { q: mark, ...query })).items.map(({ id }) => id).toSorted();
    expect(await ids({ state: 'active' })).toEqual([active.id, moderator.id].toSorted());
    expect(await ids({ state: 'unverified' })).toEqual([unverified.id]);
    expect(await ids({ state: 'suspended' })).toEqual([suspended.id]);
    expect(await ids({ state: 'closed' })).toEqual([]);
    expect(await ids({ role: 'moderator' })).toEqual([moderator.id]);
    expect(await ids({ role: 'moderator', state: 'suspended' })).toEqual([]);
  });

  test('who closed their account are listed as closed, without an address; who never had one is not listed', async () => {
    const browser = await registrarBrowser();
    const id = uuidV7();
    await Member.query(people.knex).insert({ id, displayName: 'a former member', email: null, closedAt: '2026-02-01T00:00:00Z' });
    const closed = (await list(browser, { state: 'closed', limit: '100' })).items.find((one) => one.id === id);
    expect(closed).toMatchObject({ email: null, state: 'closed', role: 'member' });

    const never = uuidV7();
    await Member.query(people.knex).insert({ id: never, displayName: `Only a source ${never}`, email: null });
    expect((await list(browser, { q: never })).items).toEqual([]);
    await problemOf(browser.get(`/api/admin/members/${never}`), 404);
  });

  test('come page by page, each once', async () => {
    const browser = await registrarBrowser();
    const mark = uuidV7().slice(-8);
    for (const place of [1, 2, 3, 4, 5]) await people.addMember({ displayName: `Paged ${mark} ${place}` });
    for (const sort of ['name', '-joined']) {
      const names: string[] = [];
      let after: string | null = '';
      while (after !== null) {
        const page: z.infer<typeof List> = await list(browser, { q: mark, sort, limit: '2', ...(after === '' ? {} : { after }) });
        names.push(...page.items.map(({ displayName }) => displayName.slice(-1)));
        after = page.next;
      }
      expect(names).toEqual(sort === 'name' ? ['1', '2', '3', '4', '5'] : ['5', '4', '3', '2', '1']);
    }
    expect(pathsOf(await problemOf(browser.get('/api/admin/members').query({ after: 'nonsense' }), 422))).toEqual(['after']);
    expect(pathsOf(await problemOf(browser.get('/api/admin/members').query({ role: 'owner' }), 422))).toEqual(['role']);
  });

  test('show what they decide for, whether they have a second factor, and when they were last seen', async () => {
    const browser = await registrarBrowser();
    const maker = await Maker.query(people.knex).findOne({ slug: 'brackwater-tractor-works' }).throwIfNotFound();
    const member = await people.addMember({ authenticator: true });
    await Member.query(people.knex).findById(member.id).patch({ role: 'moderator', scope: 'some' });
    await MemberScope.query(people.knex).insert({ memberId: member.id, makerId: maker.id });
    const before = MemberPage.parse((await browser.get(`/api/admin/members/${member.id}`).expect(200)).body);
    expect(before).toMatchObject({ moderates: [{ slug: maker.slug, name: maker.name }], secondFactor: true, lastSeenAt: null, suspension: null, version: 1 });
    expect(before.can).toEqual({ changeRole: true, suspend: true, unsuspend: false, endSessions: true });
    const own = await signedInFully(people, member);
    await own.post('/api/sign-out').send().expect(200);
    const after = MemberPage.parse((await browser.get(`/api/admin/members/${member.id}`).expect(200)).body);
    expect(after.lastSeenAt).not.toBeNull();
    expect(JSON.stringify(after)).not.toContain('argon2');
  });
});

describe('the registrars’ pages', () => {
  const id = uuidV7();
  const calls: readonly (readonly [string, (browser: Browser) => ReturnType<Browser['get']>])[] = [
    ['members', (browser) => browser.get('/api/admin/members')],
    ['a member', (browser) => browser.get(`/api/admin/members/${id}`)],
    ['a role', (browser) => browser.put(`/api/admin/members/${id}/role`).send({ role: 'registrar', moderates: null, version: 1 })],
    ['suspend', (browser) => browser.post(`/api/admin/members/${id}/suspend`).send({ reason: 'Because', version: 1 })],
    ['unsuspend', (browser) => browser.post(`/api/admin/members/${id}/unsuspend`).send({ reason: 'Because', version: 1 })],
    ['end sessions', (browser) => browser.post(`/api/admin/members/${id}/end-sessions`).send()],
    ['the trail', (browser) => browser.get('/api/admin/audit')],
  ];

  test.each(calls)('are not there for others: %s', async (_what, call) => {
    const visitor = people.browser();
    const member = await people.signedIn(await people.addMember());
    const moderator = await signedInFully(people, await people.addMember({ role: 'moderator', authenticator: true }));
    for (const browser of [visitor, member, moderator]) await problemOf(call(browser), 404);
  });

  test.each(calls)('want a second factor of a registrar: %s', async (_what, call) => {
    const browser = await people.signedIn(await people.addMember({ role: 'registrar' }));
    expect((await problemOf(call(browser), 403)).type).toBe('/problems/second-factor-owed');
  });

  test.each(calls.slice(1, 6))('find nobody with an id that is nobody’s: %s', async (_what, call) => {
    await problemOf(call(await registrarBrowser()), 404);
  });
});
