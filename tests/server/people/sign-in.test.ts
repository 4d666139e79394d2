import { hash, verify } from '@node-rs/argon2';
import type * as Argon2 from '@node-rs/argon2';
import { v7 as uuidV7 } from 'uuid';
import { beforeEach, describe, expect, test, vi } from 'vitest';
import { Attempt } from '#db/models/attempt.ts';
import { Member } from '#db/models/member.ts';
import { Session } from '#db/models/session.ts';
import { hashOfSecret } from '#server/services/people/secrets.ts';
import { PASSWORD_HASHING } from '#server/services/people/passwords.ts';
import { PASSWORD, sessionOf, usePeople } from '#tests/support/people.ts';

// The package does its work as always; its calls are counted, which a clock on a shared machine could not tell.
vi.mock('@node-rs/argon2', async (importOriginal) => {
  const real = await importOriginal<typeof Argon2>();
  return { ...real, hash: vi.fn(real.hash), verify: vi.fn(real.verify) };
});
beforeEach(() => {
  vi.mocked(hash).mockClear();
  vi.mocked(verify).mockClear();
});

const people = usePeople();
const WRONG = 'not the password of anybody';

async function signInFrom(network: string, email: string, password: string) {
  return people.browser({ network }).post('/api/sign-in').send({ email, password });
}

describe('signing in', () => {
  test('answers who one is, sets the cookie and writes it down', async () => {
    const member = await people.addMember({ displayName: 'Sorrel Vane' });
    const browser = people.browser({ userAgent: 'Mozilla/5.0 (X11; Linux x86_64; rv:140.0) Gecko/20100101 Firefox/140.0' });
    const response = await browser.post('/api/sign-in').send({ email: member.email, password: PASSWORD }).expect(200);
    expect(response.body).toEqual({
      state: 'signed-in',
      me: {
        id: member.id,
        displayName: 'Sorrel Vane',
        email: member.email,
        role: 'member',
        moderates: [],
        secondFactors: { authenticator: false, passkeys: 0, recoveryCodesLeft: 0 },
        secondFactorOwed: false,
        unreadNotices: 0,
        can: { decideContributions: false, seeMembers: false, seeAudit: false },
      },
    });
    expect(response.headers['cache-control']).toBe('no-store');
    expect((await browser.get('/api/me').expect(200)).body).toMatchObject({ me: { id: member.id } });
    const [act] = await people.actsOf(member.id);
    expect(act).toMatchObject({ act: 'session.started', actorId: member.id, detail: { strength: 'password' } });
    expect(act?.requestId).toBe(response.headers['x-request-id']);
    expect(await Session.query(people.knex).findOne({ memberId: member.id })).toMatchObject({ device: 'Firefox on Linux', stage: 'open' });
  });

  test('takes the address in any case', async () => {
    const member = await people.addMember({ email: 'Teasel.Wick@Bench.example' });
    await people.browser().post('/api/sign-in').send({ email: 'TEASEL.wick@bench.EXAMPLE', password: PASSWORD }).expect(200);
    expect((await people.actsOf(member.id)).map(({ act }) => act)).toEqual(['session.started']);
  });

  test('keeps the secret out of the answer, the log and the database', async () => {
    const member = await people.addMember();
    const browser = people.browser();
    const response = await browser.post('/api/sign-in').send({ email: member.email, password: PASSWORD }).expect(200);
    const secret = sessionOf(browser) ?? '';
    expect(secret).toMatch(/^[\w-]{43}$/);
    expect(response.text).not.toContain(secret);
    expect(people.log.text()).not.toContain(secret);
    expect(people.log.text()).not.toContain(PASSWORD);
    const session = await Session.query(people.knex).findOne({ memberId: member.id }).throwIfNotFound();
    expect(session.id).toBe(hashOfSecret(secret));
    expect(JSON.stringify(session)).not.toContain(secret);
  });

  test.each([
    ['on plain http, for this host alone', {}, /^session=[\w-]{43}; Max-Age=2592000; Path=\/; Expires=[^;]+; HttpOnly; SameSite=Lax$/],
    [
      'on https, by the host it came from alone',
      { publicOrigin: 'https://register.example' },
      /^__Host-session=[\w-]{43}; Max-Age=2592000; Path=\/; Expires=[^;]+; HttpOnly; Secure; SameSite=Lax$/,
    ],
    [
      'in production',
      { environment: 'production', publicOrigin: 'http://127.0.0.1:5080' } as const,
      /^__Host-session=[\w-]{43}; Max-Age=2592000; Path=\/; Expires=[^;]+; HttpOnly; Secure; SameSite=Lax$/,
    ],
  ])('sets a cookie for no script and no other site, %s', async (_where, settings, cookie) => {
    const member = await people.addMember();
    const browser = people.browser({ app: people.anotherApp(settings) });
    const response = await browser
      .post('/api/sign-in')
      .set('Sec-Fetch-Site', 'same-origin')
      .send({ email: member.email, password: PASSWORD })
      .expect(200);
    expect(response.headers['set-cookie']).toEqual([expect.stringMatching(cookie)]);
  });

  test('gives a cookie that was planted a new value, and the planted one stays worthless', async () => {
    const member = await people.addMember();
    const planted = 'A'.repeat(43);
    const browser = people.browser();
    const response = await browser
      .post('/api/sign-in')
      .set('Cookie', `session=${planted}`)
      .send({ email: member.email, password: PASSWORD })
      .expect(200);
    expect(response.headers['set-cookie']?.[0]).not.toContain(planted);
    const other = people.browser();
    expect((await other.get('/api/me').set('Cookie', `session=${planted}`)).body).toEqual({ me: null });
    await other.get('/api/me/sessions').set('Cookie', `session=${planted}`).expect(401);
  });

  test('ends the session the browser had, whosever it was', async () => {
    const first = await people.addMember();
    const second = await people.addMember();
    const browser = await people.signedIn(first);
    const old = sessionOf(browser);
    await browser.post('/api/sign-in').send({ email: second.email, password: PASSWORD }).expect(200);
    await people.browser().get('/api/me/sessions').set('Cookie', `session=${String(old)}`).expect(401);
    expect((await browser.get('/api/me')).body).toMatchObject({ me: { id: second.id } });
  });

  test('hashes the password anew when the parameters were others', async () => {
    const member = await people.addMember();
    const weaker = await hash(PASSWORD, { ...PASSWORD_HASHING, memoryCost: 19_456, timeCost: 2 });
    await Member.query(people.knex).findById(member.id).patch({ passwordHash: weaker });
    const browser = people.browser();
    await browser.post('/api/sign-in').send({ email: member.email, password: PASSWORD }).expect(200);
    const { passwordHash } = await Member.query(people.knex).findById(member.id).throwIfNotFound();
    expect(passwordHash).toMatch(/^\$argon2id\$v=19\$m=65536,t=3,p=1\$/);
    await people.browser().post('/api/sign-in').send({ email: member.email, password: PASSWORD }).expect(200);
    expect((await Member.query(people.knex).findById(member.id))?.passwordHash).toBe(passwordHash);
  });
});

describe('whose second factor is owed', () => {
  test('is not signed in yet, and is told the ways', async () => {
    const member = await people.addMember({ role: 'moderator', authenticator: true });
    const browser = people.browser();
    const response = await browser.post('/api/sign-in').send({ email: member.email, password: PASSWORD }).expect(200);
    expect(response.body).toEqual({ state: 'second-factor', ways: ['authenticator'] });
    expect(sessionOf(browser)).toMatch(/^[\w-]{43}$/);
    expect((await browser.get('/api/me')).body).toEqual({ me: null });
    await browser.get('/api/me/sessions').expect(401);
    await browser.get('/api/me/export').expect(401);
    await browser.put('/api/me/name').send({ displayName: 'Somebody Else' }).expect(401);
    expect((await people.actsOf(member.id)).map(({ act }) => act)).toEqual([]);
  });
});

describe('somebody who may not sign in', () => {
  test('gets one answer for a wrong password, an unknown address and one never confirmed', async () => {
    const member = await people.addMember();
    const unconfirmed = await people.addMember({ verified: false });
    const answers = [
      await people.browser().post('/api/sign-in').send({ email: member.email, password: WRONG }),
      await people.browser().post('/api/sign-in').send({ email: 'nobody@bench.example', password: WRONG }),
      await people.browser().post('/api/sign-in').send({ email: unconfirmed.email, password: WRONG }),
      await people.browser().post('/api/sign-in').send({ email: unconfirmed.email, password: PASSWORD }),
    ];
    const [first] = answers;
    for (const answer of answers) {
      expect(answer.status).toBe(401);
      expect({ ...answer.body, requestId: '' }).toEqual({ ...first?.body, requestId: '' });
      expect(answer.headers['set-cookie']).toBeUndefined();
      expect(Object.keys(answer.headers).sort()).toEqual(Object.keys(first?.headers ?? {}).sort());
    }
  });

  test('causes the same work whether the address is known or not', async () => {
    const member = await people.addMember();
    const work = async (email: string) => {
      vi.mocked(verify).mockClear();
      const statements: string[] = [];
      const note = ({ sql }: { sql: string }): number => statements.push(sql);
      people.knex.on('query', note);
      await people.browser().post('/api/sign-in').send({ email, password: WRONG }).expect(401);
      people.knex.off('query', note);
      return { comparisons: vi.mocked(verify).mock.calls.length, parameters: vi.mocked(verify).mock.calls[0]?.[0].slice(0, 30), statements };
    };
    const known = await work(member.email);
    const unknown = await work('nobody-at-all@bench.example');
    expect(known).toEqual(unknown);
    expect(known.comparisons).toBe(1);
    expect(known.statements.length).toBeGreaterThan(5);
  });

  test('is written down: of whom, not with what', async () => {
    const member = await people.addMember();
    await people.browser().post('/api/sign-in').send({ email: member.email, password: WRONG }).expect(401);
    const [act] = await people.actsOf(member.id);
    expect(act).toMatchObject({ act: 'session.refused', actorId: null, detail: { reason: 'wrong-password' } });
    expect(JSON.stringify(act)).not.toContain(WRONG);
    expect(people.log.text()).not.toContain(WRONG);
  });

  test('and is suspended is told so, provided the password is theirs', async () => {
    const registrar = await people.addMember({ role: 'registrar' });
    const member = await people.addMember();
    await Member.query(people.knex)
      .findById(member.id)
      .patch({ suspendedAt: '2026-02-01T00:00:00Z', suspensionReason: 'Sold what was not theirs', suspendedById: registrar.id });
    const right = await people.browser().post('/api/sign-in').send({ email: member.email, password: PASSWORD }).expect(403);
    expect(right.body).toMatchObject({ detail: expect.stringContaining('suspended') as string });
    await people.browser().post('/api/sign-in').send({ email: member.email, password: WRONG }).expect(401);
    expect(await Session.query(people.knex).where({ memberId: member.id }).resultSize()).toBe(0);
  });

  test('uses an account of the demo in production', async () => {
    const member = await people.addMember({ demo: true });
    const production = people.browser({ app: people.anotherApp({ environment: 'production' }) });
    await production.post('/api/sign-in').send({ email: member.email, password: PASSWORD }).expect(403);
    await people.browser().post('/api/sign-in').send({ email: member.email, password: PASSWORD }).expect(200);
  });

  test.each([
    ['no body', {}],
    ['an address that is none', { email: 'nobody', password: PASSWORD }],
    ['two addresses', { email: 'a@b.example, c@d.example', password: PASSWORD }],
    ['a line break', { email: 'a@b.example\r\nBcc: c@d.example', password: PASSWORD }],
    ['no password', { email: 'a@b.example', password: '' }],
    ['more than is asked for', { email: 'a@b.example', password: PASSWORD, role: 'registrar' }],
    ['a password that is no text', { email: 'a@b.example', password: { $ne: '' } }],
  ])('sends %s', async (_what, body) => {
    await people.browser().post('/api/sign-in').send(body).expect(422);
  });
});

describe('wrong passwords', () => {
  test('a thousand of them are slowed down, and the owner gets in by a link all the same', async () => {
    const member = await people.addMember();
    const statuses = new Map<number, number>();
    for (let round = 0; round < 1_000; round += 1) {
      const { status, headers } = await signInFrom(`172.16.${round >> 8}.${round & 255}`, member.email, WRONG);
      statuses.set(status, (statuses.get(status) ?? 0) + 1);
      if (status === 429) expect(Number(headers['retry-after'])).toBeGreaterThan(0);
    }
    expect([...statuses.keys()].sort()).toEqual([401, 429]);
    expect(statuses.get(401)).toBeLessThanOrEqual(100);
    expect(vi.mocked(verify).mock.calls.length).toBe(statuses.get(401));
    await people.browser().post('/api/sign-in').send({ email: member.email, password: PASSWORD }).expect(429);

    await people.browser().post('/api/password/forgot').send({ email: member.email }).expect(200);
    const token = await people.linkTo(member.email);
    const password = 'another one, set with the link';
    await people.browser().post('/api/password/reset').send({ token, password }).expect(200);
    await people.browser().post('/api/sign-in').send({ email: member.email, password }).expect(200);
  }, 120_000);

  test('leave alone whoever is signed in', async () => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    for (let round = 0; round < 8; round += 1) await people.browser().post('/api/sign-in').send({ email: member.email, password: WRONG });
    await people.browser().post('/api/sign-in').send({ email: member.email, password: PASSWORD }).expect(429);
    await browser.get('/api/me/sessions').expect(200);
  });

  test('sent all at once are no way round', async () => {
    const member = await people.addMember();
    const answers = await Promise.all(
      Array.from({ length: 30 }, (_, place) => signInFrom(`172.20.0.${place}`, member.email, WRONG)),
    );
    expect(answers.filter(({ status }) => status === 401)).toHaveLength(5);
    expect(answers.filter(({ status }) => status === 429)).toHaveLength(25);
  });

  test('a forged forwarding header is no way round where no proxy is trusted', async () => {
    const rows = Array.from({ length: 30 }, () => ({ id: uuidV7(), kind: 'password', account: hashOfSecret('anybody'), network: '127.0.0.1/32' }) as const);
    await Attempt.query(people.knex).insert(rows);
    const body = { email: 'forger@bench.example', password: WRONG };
    const app = people.anotherApp({ trustProxy: [] });
    await people.browser({ app, network: '172.22.0.1' }).post('/api/sign-in').send(body).expect(429);
    await people.browser({ network: '172.22.0.1' }).post('/api/sign-in').send(body).expect(401);
  });

  test('are forgotten once the right one is given', async () => {
    const member = await people.addMember();
    for (let round = 0; round < 4; round += 1) await people.browser().post('/api/sign-in').send({ email: member.email, password: WRONG }).expect(401);
    await people.browser().post('/api/sign-in').send({ email: member.email, password: PASSWORD }).expect(200);
    for (let round = 0; round < 5; round += 1) await people.browser().post('/api/sign-in').send({ email: member.email, password: WRONG }).expect(401);
  });
});

describe('a cookie', () => {
  test('made of any row of a copied table of sessions signs nobody in', async () => {
    await people.signedIn(await people.addMember());
    const rows = await Session.query(people.knex);
    expect(rows.length).toBeGreaterThan(0);
    for (const { id, publicId, memberId } of rows) {
      for (const value of [id, publicId, memberId, Buffer.from(id, 'hex').toString('base64url')]) {
        await people.browser().get('/api/me/sessions').set('Cookie', `session=${value}`).expect(401);
      }
    }
  });

  test.each(['%', 'x=%', 'session=%', 'session', 'session=', '=;=;', 'session=a=b', ';;;', 'session=\u00ff', `session=${'A'.repeat(5_000)}`])(
    'that is misshapen (%s) is a visitor’s',
    async (cookie) => {
      const response = await people.browser().get('/api/me').set('Cookie', cookie).expect(200);
      expect(response.body).toEqual({ me: null });
    },
  );

  test('that is there twice is a visitor’s, for nobody knows which is ours', async () => {
    const browser = await people.signedIn(await people.addMember());
    const secret = String(sessionOf(browser));
    const twice = await people.browser().get('/api/me').set('Cookie', `session=${'B'.repeat(43)}; session=${secret}`);
    expect(twice.body).toEqual({ me: null });
    const once = await people.browser().get('/api/me').set('Cookie', `other=%; session=${secret}; more=1`);
    expect(once.body).toMatchObject({ me: expect.anything() as object });
  });

  test('of the name used on plain http is not taken on https', async () => {
    const browser = await people.signedIn(await people.addMember());
    const https = people.browser({ app: people.anotherApp({ publicOrigin: 'https://register.example' }) });
    expect((await https.get('/api/me').set('Cookie', `session=${String(sessionOf(browser))}`)).body).toEqual({ me: null });
  });
});

test('another site’s page signs nobody in or out', async () => {
  const member = await people.addMember();
  const browser = await people.signedIn(member);
  for (const path of ['/api/sign-in', '/api/sign-out']) {
    await browser.post(path).set('Origin', 'https://elsewhere.example').send({ email: member.email, password: PASSWORD }).expect(403);
  }
  expect((await browser.get('/api/me')).body).toMatchObject({ me: { id: member.id } });
});
