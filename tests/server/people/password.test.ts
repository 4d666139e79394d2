import { afterEach, describe, expect, test, vi } from 'vitest';
import { LinkToken } from '#db/models/link-token.ts';
import { Member } from '#db/models/member.ts';
import { Session } from '#db/models/session.ts';
import { hashOfSecret } from '#server/services/people/secrets.ts';
import { PASSWORD, sessionOf, usePeople } from '#tests/support/people.ts';

const people = usePeople();
const NEW = 'a new one, longer than the old';

afterEach(() => {
  vi.useRealTimers();
});

async function askForLink(email: string): Promise<string> {
  await people.browser().post('/api/password/forgot').send({ email }).expect(200, { done: true });
  return people.linkTo(email);
}

async function mustSignIn(email: string, password: string, status: number): Promise<void> {
  await people.browser().post('/api/sign-in').send({ email, password }).expect(status);
}

describe('a forgotten password', () => {
  test('is replaced with the link, which ends every session and signs nobody in', async () => {
    const member = await people.addMember();
    const browsers = [await people.signedIn(member), await people.signedIn(member)];
    const token = await askForLink(member.email);
    const browser = people.browser();
    const response = await browser.post('/api/password/reset').send({ token, password: NEW }).expect(200, { done: true });
    expect(response.headers['set-cookie']).toBeUndefined();
    expect((await browser.get('/api/me')).body).toEqual({ me: null });
    for (const old of browsers) await old.get('/api/me/sessions').expect(401);
    await mustSignIn(member.email, PASSWORD, 401);
    await mustSignIn(member.email, NEW, 200);
    expect((await people.lettersTo(member.email))[0]).toMatchObject({ template: 'password-changed', memberId: member.id });
    expect((await people.actsOf(member.id)).map(({ act }) => act)).toEqual([
      'session.started',
      'session.started',
      'password.reset-asked',
      'password.reset',
      'session.refused',
      'session.started',
    ]);
  });

  test('link works once, of twenty at the same time for one', async () => {
    const member = await people.addMember();
    const token = await askForLink(member.email);
    const answers = await Promise.all(
      Array.from({ length: 20 }, (_, place) => people.browser().post('/api/password/reset').send({ token, password: `${NEW} ${place}` })),
    );
    const won = answers.flatMap(({ status }, place) => (status === 200 ? [place] : []));
    expect(won).toHaveLength(1);
    expect(answers.filter(({ status }) => status === 422)).toHaveLength(19);
    expect((await people.actsOf(member.id)).filter(({ act }) => act === 'password.reset')).toHaveLength(1);
    await mustSignIn(member.email, `${NEW} ${won[0]}`, 200);
    await people.browser().post('/api/password/reset').send({ token, password: NEW }).expect(422);
  }, 60_000);

  test('link is void once a newer one was sent', async () => {
    const member = await people.addMember();
    const first = await askForLink(member.email);
    const second = await askForLink(member.email);
    await people.browser().post('/api/password/reset').send({ token: first, password: NEW }).expect(422);
    await people.browser().post('/api/password/reset').send({ token: second, password: NEW }).expect(200);
  });

  test('link works for an hour, by the database’s clock', async () => {
    const member = await people.addMember();
    const token = await askForLink(member.email);
    const link = LinkToken.query(people.knex).findById(hashOfSecret(token));
    const { rows } = await people.knex.raw<{ rows: { lasts: number }[] }>(
      'select round(extract(epoch from expires_at - now()))::integer as lasts from link_tokens where hash = ?',
      [hashOfSecret(token)],
    );
    expect(rows[0]?.lasts).toBeGreaterThan(3_500);
    expect(rows[0]?.lasts).toBeLessThanOrEqual(3_600);
    await link.patch({ expiresAt: people.knex.raw(`now() - interval '1 second'`) });
    await people.browser().post('/api/password/reset').send({ token, password: NEW }).expect(422);
    await mustSignIn(member.email, PASSWORD, 200);
  });

  test.each([
    ['fast', 2],
    ['slow', -2],
  ])('link lives no shorter and no longer on a server whose clock is two hours %s', async (_how, hours) => {
    const member = await people.addMember();
    vi.useFakeTimers({ toFake: ['Date'], now: Date.now() + hours * 3_600_000 });
    const old = await askForLink(member.email);
    await LinkToken.query(people.knex)
      .findById(hashOfSecret(old))
      .patch({ expiresAt: people.knex.raw(`expires_at - interval '1 hour 1 second'`) });
    await people.browser().post('/api/password/reset').send({ token: old, password: NEW }).expect(422);
    const token = await askForLink(member.email);
    await people.browser().post('/api/password/reset').send({ token, password: NEW }).expect(200);
  });

  test('link is left as it was by a password that is refused', async () => {
    const member = await people.addMember({ displayName: 'Bryony Halt' });
    const token = await askForLink(member.email);
    for (const password of ['fourteen chars', 'passwordpassword', 'bryony halt 123', 'x'.repeat(129)]) {
      const response = await people.browser().post('/api/password/reset').send({ token, password }).expect(422);
      expect(response.body).toMatchObject({ errors: [{ path: ['password'] }] });
    }
    await people.browser().post('/api/password/reset').send({ token, password: NEW }).expect(200);
  });

  test('link also confirms the address it came to', async () => {
    const member = await people.addMember({ verified: false });
    const token = await askForLink(member.email);
    await people.browser().post('/api/password/reset').send({ token, password: NEW }).expect(200);
    await mustSignIn(member.email, NEW, 200);
  });

  test('may be shorter where there is a second factor', async () => {
    const member = await people.addMember({ authenticator: true });
    const token = await askForLink(member.email);
    await people.browser().post('/api/password/reset').send({ token, password: 'seven 7' }).expect(422);
    await people.browser().post('/api/password/reset').send({ token, password: 'eight ch' }).expect(200);
  });

  test('of an address nobody has gets the same answer, and a letter that says so', async () => {
    const member = await people.addMember();
    const known = await people.browser().post('/api/password/forgot').send({ email: member.email });
    const unknown = await people.browser().post('/api/password/forgot').send({ email: 'nobody-there@bench.example' });
    expect(unknown.status).toBe(known.status);
    expect(unknown.body).toEqual(known.body);
    expect(Object.keys(unknown.headers).sort()).toEqual(Object.keys(known.headers).sort());
    expect(await people.lettersTo('nobody-there@bench.example')).toMatchObject([{ template: 'no-account', memberId: null, data: {} }]);
  });

  test('causes the same work whether the address is known or not', async () => {
    const member = await people.addMember();
    const work = async (email: string): Promise<readonly string[]> => {
      const statements: string[] = [];
      const note = ({ sql }: { sql: string }): number => statements.push(sql);
      people.knex.on('query', note);
      await people.browser().post('/api/password/forgot').send({ email }).expect(200);
      people.knex.off('query', note);
      return statements;
    };
    const known = await work(member.email);
    expect(known).toEqual(await work('still-nobody@bench.example'));
    expect(known.length).toBeGreaterThan(6);
  });

  test('asked for by a member who is suspended opens nothing', async () => {
    const registrar = await people.addMember({ role: 'registrar' });
    const member = await people.addMember();
    const suspension = { suspendedAt: '2026-02-01T00:00:00Z', suspensionReason: 'Sold what was not theirs', suspendedById: registrar.id };
    await Member.query(people.knex).findById(member.id).patch(suspension);
    const token = await askForLink(member.email);
    await people.browser().post('/api/password/reset').send({ token, password: NEW }).expect(200);
    await mustSignIn(member.email, NEW, 403);
  });
});

describe('changing the password', () => {
  test('ends every other session, gives this one a new secret, voids links and tells the address', async () => {
    const member = await people.addMember();
    const other = await people.signedIn(member);
    const browser = await people.signedIn(member);
    const before = sessionOf(browser);
    const link = await askForLink(member.email);
    await browser.put('/api/me/password').send({ password: PASSWORD, newPassword: NEW }).expect(200, { done: true });
    await other.get('/api/me/sessions').expect(401);
    await browser.get('/api/me/sessions').expect(200);
    expect(sessionOf(browser)).not.toBe(before);
    await people.browser().get('/api/me/sessions').set('Cookie', `session=${String(before)}`).expect(401);
    await people.browser().post('/api/password/reset').send({ token: link, password: 'somebody else’s password' }).expect(422);
    await mustSignIn(member.email, PASSWORD, 401);
    await mustSignIn(member.email, NEW, 200);
    expect((await people.lettersTo(member.email))[0]).toMatchObject({ template: 'password-changed' });
    expect(await people.actsOf(member.id)).toContainEqual(
      expect.objectContaining({ act: 'password.changed', actorId: member.id, detail: { otherSessionsEnded: 1 } }),
    );
  });

  test.each([
    ['a wrong present one', { password: 'not the present one', newPassword: NEW }, 403, 'password'],
    ['none', { newPassword: NEW }, 422, 'password'],
    ['a new one too short', { password: PASSWORD, newPassword: 'fourteen chars' }, 422, 'newPassword'],
    ['a new one too long', { password: PASSWORD, newPassword: 'x'.repeat(129) }, 422, 'newPassword'],
  ])('with %s changes nothing and says at which field', async (_what, body, status, field) => {
    const member = await people.addMember();
    const other = await people.signedIn(member);
    const browser = await people.signedIn(member);
    const response = await browser.put('/api/me/password').send(body).expect(status);
    expect(response.body).toMatchObject({ errors: [{ path: [field] }] });
    await other.get('/api/me/sessions').expect(200);
    await mustSignIn(member.email, PASSWORD, 200);
    expect((await people.lettersTo(member.email)).map(({ template }) => template)).toEqual([]);
  });

  test('is nothing a visitor can do, nor somebody whose session ended meanwhile', async () => {
    const member = await people.addMember();
    const body = { password: PASSWORD, newPassword: NEW };
    await people.browser().put('/api/me/password').send(body).expect(401);
    const browser = await people.signedIn(member);
    await Session.query(people.knex).delete().where({ memberId: member.id });
    await browser.put('/api/me/password').send(body).expect(401);
  });

  test('by guessing the present one is slowed down with the guesses at the door', async () => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    for (let round = 0; round < 5; round += 1) {
      await browser.put('/api/me/password').send({ password: `guess ${round}`, newPassword: NEW }).expect(403);
    }
    await browser.put('/api/me/password').send({ password: PASSWORD, newPassword: NEW }).expect(429);
    await mustSignIn(member.email, PASSWORD, 429);
  });

  test('in two tabs at once is done by one of them', async () => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    const cookie = `session=${String(sessionOf(browser))}`;
    const answers = await Promise.all(
      [1, 2].map((tab) =>
        people.browser().put('/api/me/password').set('Cookie', cookie).send({ password: PASSWORD, newPassword: `${NEW}, tab ${tab}` }),
      ),
    );
    const statuses = answers.map(({ status }) => status);
    expect(statuses.filter((status) => status === 200)).toHaveLength(1);
    expect(statuses.find((status) => status !== 200)).toSatisfy((status: number) => status === 409 || status === 401 || status === 403);
    await mustSignIn(member.email, `${NEW}, tab ${statuses.indexOf(200) + 1}`, 200);
  });
});

describe('a password is compared as it was typed', () => {
  test('to its 128th character', async () => {
    const member = await people.addMember();
    const token = await askForLink(member.email);
    const long = Array.from({ length: 128 }, (_, place) => String.fromCharCode(97 + ((place * 7) % 26))).join('');
    await people.browser().post('/api/password/reset').send({ token, password: long }).expect(200);
    await mustSignIn(member.email, long, 200);
    await mustSignIn(member.email, `${long.slice(0, 127)}!`, 401);
    await mustSignIn(member.email, long.slice(0, 127), 401);
  });

  test.each([
    ['spaces and emoji', '🔩 ⚙️ 🛠️ 🚜 🔥 ⛓️ 🧲 📏', '🔩 ⚙️ 🛠️ 🚜 🔥 ⛓️ 🧲'],
    ['spaces at its ends', '  four gear cases here  ', 'four gear cases here'],
    ['capitals', 'Four Gear Cases Here', 'four gear cases here'],
  ])('with %s', async (_what, password, near) => {
    const member = await people.addMember();
    const token = await askForLink(member.email);
    await people.browser().post('/api/password/reset').send({ token, password }).expect(200);
    await mustSignIn(member.email, near, 401);
    await mustSignIn(member.email, password, 200);
  });

  test('on whichever keyboard: one character is one, however it is put together', async () => {
    const member = await people.addMember();
    const token = await askForLink(member.email);
    const composed = 'Gu\u00dfst\u00fcck am Fu\u00df';
    await people.browser().post('/api/password/reset').send({ token, password: composed }).expect(200);
    await mustSignIn(member.email, composed.normalize('NFD'), 200);
  });
});
