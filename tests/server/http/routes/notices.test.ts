import supertest from 'supertest';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import * as contract from '#contract/notices.ts';
import type { NoticeKind } from '#contract/notices.ts';
import { Notice } from '#db/models/notice.ts';
import { eraseMailOf } from '#server/mail/erase-mail-of.ts';
import { notify } from '#server/services/notices/notify.ts';
import { usePeople } from '#tests/support/people.ts';
import { pathsOf, problemOf } from '#tests/support/problem.ts';

const people = usePeople();

/** Tells a member things with these titles, the last the newest; all in one transaction, so in the same instant, where asked. */
async function tell(memberId: string, titles: readonly string[], { kind = 'role', atOnce = false }: { kind?: NoticeKind; atOnce?: boolean } = {}): Promise<void> {
  const one = (title: string) => ({ memberId, kind, title, body: `About ${title}.`, href: null });
  if (!atOnce) {
    for (const title of titles) await people.knex.transaction((trx) => notify(one(title), trx));
    return;
  }
  await people.knex.transaction(async (trx) => {
    for (const title of titles) await notify(one(title), trx);
  });
}

async function list(browser: supertest.Agent, query = ''): Promise<z.output<typeof contract.listNotices.answer>> {
  const response = await browser.get(`/api/me/notifications${query}`).expect(200);
  return contract.listNotices.answer.parse(response.body);
}

function titlesOf({ items }: { readonly items: readonly { readonly title: string }[] }): readonly string[] {
  return items.map(({ title }) => title);
}

describe('a member’s notices', () => {
  test('are listed newest first, with how many there are, and kept by no cache', async () => {
    const member = await people.addMember();
    await tell(member.id, ['First', 'Second']);
    const browser = await people.signedIn(member);
    const response = await browser.get('/api/me/notifications').expect(200);
    expect(response.headers['cache-control']).toBe('no-store');
    expect(response.body).toMatchObject({
      items: [
        { kind: 'role', title: 'Second', body: 'About Second.', href: null, read: false },
        { title: 'First' },
      ],
      next: null,
      total: 2,
    });
  });

  test.each([false, true])('come page by page, none twice and none missed, whether of one instant or not (%s)', async (atOnce) => {
    const member = await people.addMember();
    const titles = ['A', 'B', 'C', 'D', 'E'];
    await tell(member.id, titles, { atOnce });
    const browser = await people.signedIn(member);

    const first = await list(browser, '?limit=2');
    await tell(member.id, ['Later']);
    const second = await list(browser, `?limit=2&after=${first.next!}`);
    const third = await list(browser, `?limit=2&after=${second.next!}`);
    expect([first, second, third].flatMap(titlesOf)).toEqual(titles.toReversed());
    expect(third.next).toBeNull();
    expect(second.total).toBeUndefined();
  });

  test('can be narrowed to those not read yet, and searched', async () => {
    const member = await people.addMember();
    await tell(member.id, ['Mark 100% read', 'Another thing']);
    const browser = await people.signedIn(member);
    const [newest] = (await list(browser)).items;
    await browser.post('/api/me/notifications/read').send({ ids: [newest!.id] }).expect(200, { unread: 1 });
    expect(titlesOf(await list(browser, '?unread=true'))).toEqual(['Mark 100% read']);
    expect(titlesOf(await list(browser, '?unread=false'))).toEqual(['Another thing']);
    expect(titlesOf(await list(browser, '?q=100%25'))).toEqual(['Mark 100% read']);
    expect(titlesOf(await list(browser, '?q=_00'))).toEqual([]);
  });

  test.each(['?after=x', '?after=WyItYXQiLCJub3cuLi4iLCJ4Il0', '?sort=at', '?unread=maybe', '?limit=0', '?who=me'])('refuse %s', async (query) => {
    const browser = await people.signedIn(await people.addMember());
    await problemOf(browser.get(`/api/me/notifications${query}`), 422);
  });

  test('are all read at once, and stay read when they were', async () => {
    const member = await people.addMember();
    await tell(member.id, ['First', 'Second']);
    const browser = await people.signedIn(member);
    await browser.post('/api/me/notifications/read').send({}).expect(200, { unread: 0 });
    const before = await Notice.query(people.knex).where({ memberId: member.id }).orderBy('id');
    await browser.post('/api/me/notifications/read').send({}).expect(200, { unread: 0 });
    expect(await Notice.query(people.knex).where({ memberId: member.id }).orderBy('id')).toEqual(before);
    expect((await list(browser)).items.every(({ read }) => read)).toBe(true);
  });

  test('are nobody else’s: another sees none of them and cannot mark them', async () => {
    const [member, other] = [await people.addMember(), await people.addMember()];
    await tell(member.id, ['Only for one']);
    const [notice] = await Notice.query(people.knex).where({ memberId: member.id });
    const browser = await people.signedIn(other);
    expect(await list(browser)).toEqual({ items: [], next: null, total: 0 });
    await browser.post('/api/me/notifications/read').send({ ids: [notice!.id] }).expect(200, { unread: 0 });
    expect(await Notice.query(people.knex).findById(notice!.id)).toMatchObject({ readAt: null });
  });

  test.each([
    ['get', '/api/me/notifications'],
    ['get', '/api/me/notification-choices'],
    ['post', '/api/me/notifications/read'],
    ['put', '/api/me/notification-choices'],
  ] as const)('are not for visitors: %s %s', async (method, path) => {
    const call = people.browser()[method](path);
    await problemOf(method === 'get' ? call : call.send(method === 'put' ? { byEmail: {} } : {}), 401);
  });

  test.each([{ ids: [] }, { ids: ['x'] }, { ids: 'all' }, { all: true }])('are not marked by %j', async (body) => {
    const browser = await people.signedIn(await people.addMember());
    await problemOf(browser.post('/api/me/notifications/read').send(body), 422);
  });
});

describe('what comes by e-mail', () => {
  test('is a choice of each kind; kinds that are not named stay', async () => {
    const browser = await people.signedIn(await people.addMember());
    const usual = { account: false, role: false, contribution: true, recomputed: false, reading: true, handover: true, message: true };
    await browser.get('/api/me/notification-choices').expect(200, { byEmail: usual });
    const chosen = { ...usual, contribution: false, role: true };
    await browser.put('/api/me/notification-choices').send({ byEmail: { contribution: false, role: true } }).expect(200, { byEmail: chosen });
    await browser.put('/api/me/notification-choices').send({ byEmail: {} }).expect(200, { byEmail: chosen });
    await browser.get('/api/me/notification-choices').expect(200, { byEmail: chosen });
  });

  test('is not chosen for kinds there are not, nor by anything but yes and no', async () => {
    const browser = await people.signedIn(await people.addMember());
    const problem = await problemOf(browser.put('/api/me/notification-choices').send({ byEmail: { weather: true, role: 'yes' } }), 422);
    expect(pathsOf(problem)).toContain('byEmail.role');
  });
});

describe('unsubscribing', () => {
  async function memberWithLetter(): Promise<{ memberId: string; email: string; token: string }> {
    const member = await people.addMember();
    await tell(member.id, ['Entered'], { kind: 'contribution' });
    const [letter] = await people.lettersTo(member.email);
    return { memberId: member.id, email: member.email, token: z.object({ unsubscribeToken: z.string() }).parse(letter!.data).unsubscribeToken };
  }

  async function lettersAfter({ memberId, email }: { memberId: string; email: string }, kind: NoticeKind): Promise<number> {
    const before = (await people.lettersTo(email)).length;
    await tell(memberId, ['One more'], { kind });
    return (await people.lettersTo(email)).length - before;
  }

  /** RFC 8058 section 3.2: the body, in either of the forms a mail program may send; no cookie and no origin. */
  test.each([
    ['application/x-www-form-urlencoded', 'List-Unsubscribe=One-Click'],
    ['multipart/form-data; boundary=x', '--x\r\nContent-Disposition: form-data; name="List-Unsubscribe"\r\n\r\nOne-Click\r\n--x--\r\n'],
  ])('takes one click of a mail program, as %s', async (type, body) => {
    const letter = await memberWithLetter();
    const response = await supertest(people.app).post(`/unsubscribe/${letter.token}`).set('Content-Type', type).send(body);
    expect(response.status).toBe(200);
    expect(response.headers['set-cookie']).toBeUndefined();
    expect(await lettersAfter(letter, 'contribution')).toBe(0);
    expect(await lettersAfter(letter, 'message')).toBe(1);
  });

  test('works from the page as well, without signing in, as often as asked', async () => {
    const letter = await memberWithLetter();
    for (let time = 1; time <= 2; time += 1) {
      await people.browser().post(`/api/unsubscribe/${letter.token}`).expect(200, { kind: 'contribution' });
    }
    expect(await lettersAfter(letter, 'contribution')).toBe(0);
  });

  test('does nothing when the page is only opened, as programs do that look into letters', async () => {
    const letter = await memberWithLetter();
    await people.browser().get(`/unsubscribe/${letter.token}`);
    await people.browser().get(`/api/unsubscribe/${letter.token}`).expect(405);
    expect(await lettersAfter(letter, 'contribution')).toBe(1);
  });

  test('can be taken back by choosing the kind again', async () => {
    const letter = await memberWithLetter();
    await people.browser().post(`/api/unsubscribe/${letter.token}`).expect(200);
    const browser = await people.signedIn(letter);
    await browser.put('/api/me/notification-choices').send({ byEmail: { contribution: true } }).expect(200);
    expect(await lettersAfter(letter, 'contribution')).toBe(1);
  });

  test('needs a link of ours', async () => {
    const letter = await memberWithLetter();
    const forged = letter.token.replace(/^./, (first) => (first === 'A' ? 'B' : 'A'));
    await problemOf(people.browser().post(`/api/unsubscribe/${forged}`), 404);
    await problemOf(people.browser().post(`/unsubscribe/${forged}`), 404);
    await problemOf(people.browser().post('/unsubscribe/short'), 404);
    expect(await lettersAfter(letter, 'contribution')).toBe(1);
  });

  test('knows no letter of a closed account', async () => {
    const letter = await memberWithLetter();
    await people.knex.transaction((trx) => eraseMailOf(letter.memberId, trx));
    await problemOf(people.browser().post(`/api/unsubscribe/${letter.token}`), 404);
  });

  test('leaves no secret in the log', async () => {
    const letter = await memberWithLetter();
    await people.browser().post(`/api/unsubscribe/${letter.token}`).expect(200);
    await people.browser().post(`/unsubscribe/${letter.token}`).expect(200);
    expect(people.log.text()).toContain('/unsubscribe/…');
    expect(people.log.text()).not.toContain(letter.token);
  });
});
