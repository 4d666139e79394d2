import { hash } from '@node-rs/argon2';
import type * as Argon2 from '@node-rs/argon2';
import { describe, expect, test, vi } from 'vitest';
import { LinkToken } from '#db/models/link-token.ts';
import { Member } from '#db/models/member.ts';
import { hashOfSecret, newSecret } from '#server/services/people/secrets.ts';
import { PASSWORD, usePeople } from '#tests/support/people.ts';

// The package does its work as always; its calls are counted.
vi.mock('@node-rs/argon2', async (importOriginal) => {
  const real = await importOriginal<typeof Argon2>();
  return { ...real, hash: vi.fn(real.hash), verify: vi.fn(real.verify) };
});

const people = usePeople();
let addresses = 0;

function newAddress(): string {
  addresses += 1;
  return `newcomer-${addresses}@bench.example`;
}

function form(more: object = {}) {
  return { displayName: 'Linnet Ashdown', email: newAddress(), password: PASSWORD, ...more };
}

async function memberOf(email: string): Promise<Member> {
  return Member.query(people.knex).findOne({ email }).throwIfNotFound();
}

describe('signing up', () => {
  test('opens an account that can be used once its address is confirmed', async () => {
    const body = form();
    const browser = people.browser();
    const response = await browser.post('/api/sign-up').send(body).expect(200);
    expect(response.body).toEqual({ done: true });
    expect(response.headers['set-cookie']).toBeUndefined();
    const member = await memberOf(body.email);
    expect(member).toMatchObject({ displayName: 'Linnet Ashdown', role: 'member', scope: 'none', demo: false, emailVerifiedAt: null });
    expect(member.passwordHash).toMatch(/^\$argon2id\$v=19\$m=65536,t=3,p=1\$/);
    await browser.post('/api/sign-in').send({ email: body.email, password: PASSWORD }).expect(401);

    const token = await people.linkTo(body.email);
    await browser.post('/api/email/verify').send({ token }).expect(200, { done: true });
    expect((await browser.get('/api/me')).body).toEqual({ me: null });
    await browser.post('/api/sign-in').send({ email: body.email, password: PASSWORD }).expect(200);
    expect((await people.actsOf(member.id)).map(({ act }) => act)).toEqual([
      'account.opened',
      'session.refused',
      'account.verified',
      'session.started',
    ]);
  });

  test('with an address nobody confirmed yet takes what was said last, and voids the link sent first', async () => {
    const first = form();
    await people.browser().post('/api/sign-up').send(first).expect(200);
    const firstLink = await people.linkTo(first.email);
    const second = form({ email: first.email.toUpperCase(), displayName: 'Linnet A.', password: 'a second thought of a password' });
    await people.browser().post('/api/sign-up').send(second).expect(200);
    await people.browser().post('/api/email/verify').send({ token: firstLink }).expect(422);
    const secondLink = await people.linkTo(second.email);
    await people.browser().post('/api/email/verify').send({ token: secondLink }).expect(200);
    await people.browser().post('/api/sign-in').send({ email: first.email, password: PASSWORD }).expect(401);
    await people.browser().post('/api/sign-in').send({ email: first.email, password: second.password }).expect(200);
  });

  test('twice at once makes one account', async () => {
    const body = form();
    const answers = await Promise.all([1, 2, 3].map(() => people.browser().post('/api/sign-up').send(body)));
    expect(answers.map(({ status }) => status)).toEqual([200, 200, 200]);
    expect(await Member.query(people.knex).whereRaw('lower(email) = ?', [body.email]).resultSize()).toBe(1);
    expect(await LinkToken.query(people.knex).where({ memberId: (await memberOf(body.email)).id }).resultSize()).toBe(1);
  });

  test.each([
    ['no name', { displayName: '' }, 'displayName'],
    ['a name of one letter', { displayName: 'x' }, 'displayName'],
    ['a name of 61 letters', { displayName: 'x'.repeat(61) }, 'displayName'],
    ['a name with a tag in it', { displayName: '<b>Linnet</b>' }, 'displayName'],
    ['a name that turns the line round', { displayName: 'Linnet\u202Enwodhsa' }, 'displayName'],
    ['no address', { email: '' }, 'email'],
    ['an address with a header behind it', { email: 'a@b.example\nBcc: c@d.example' }, 'email'],
    ['an address with a name', { email: 'Linnet <a@b.example>' }, 'email'],
    ['an address too long', { email: `${'a'.repeat(250)}@b.example` }, 'email'],
    ['a password too short', { password: 'fourteen chars' }, 'password'],
    ['a common password', { password: 'passwordpassword' }, 'password'],
    ['their name for a password', { password: 'Linnet Ashdown!' }, 'password'],
    ['a role', { role: 'registrar' }, 'role'],
    ['a confirmed address', { emailVerifiedAt: '2026-01-01T00:00:00Z' }, 'emailVerifiedAt'],
    ['an id', { id: '0199aaaa-0000-7000-8000-000000000000' }, 'id'],
  ])('is refused with %s, at that field, and leaves nothing', async (_what, more, field) => {
    const body = form(more);
    const response = await people.browser().post('/api/sign-up').send(body).expect(422);
    const { errors } = response.body as { errors: { path: string[] }[] };
    expect(errors.map(({ path }) => path[0])).toContain(field);
    expect(await Member.query(people.knex).where({ email: body.email }).resultSize()).toBe(0);
  });

  test('again and again with one address is slowed down: nobody’s mailbox is filled', async () => {
    const body = form();
    for (let round = 0; round < 3; round += 1) await people.browser().post('/api/sign-up').send(body).expect(200);
    const response = await people.browser().post('/api/sign-up').send(body).expect(429);
    expect(Number(response.headers['retry-after'])).toBeGreaterThan(30);
    await people.browser().post('/api/password/forgot').send({ email: body.email }).expect(429);
    expect(await people.lettersTo(body.email)).toHaveLength(3);
  });
});

describe('signing up with an address somebody has', () => {
  test('changes nothing, tells whoever has it and nobody else', async () => {
    const member = await people.addMember();
    const before = await memberOf(member.email);
    const known = await people.browser().post('/api/sign-up').send(form({ email: member.email }));
    const unknown = await people.browser().post('/api/sign-up').send(form());
    expect(known.status).toBe(unknown.status);
    expect(known.body).toEqual(unknown.body);
    expect(Object.keys(known.headers).sort()).toEqual(Object.keys(unknown.headers).sort());
    expect(await memberOf(member.email)).toEqual(before);
    expect(await people.lettersTo(member.email)).toMatchObject([{ template: 'already-known', data: {} }]);
    expect(await LinkToken.query(people.knex).where({ memberId: member.id }).resultSize()).toBe(0);
    expect(await people.actsOf(member.id)).toMatchObject([{ act: 'account.refused', actorId: null }]);
  });

  test('causes the same work', async () => {
    const member = await people.addMember();
    const work = async (email: string) => {
      vi.mocked(hash).mockClear();
      const statements: string[] = [];
      const note = ({ sql }: { sql: string }): number => statements.push(sql);
      people.knex.on('query', note);
      await people.browser().post('/api/sign-up').send(form({ email })).expect(200);
      people.knex.off('query', note);
      return { hashes: vi.mocked(hash).mock.calls.length, statements, letters: (await people.lettersTo(email)).length };
    };
    const known = await work(member.email);
    expect(known).toEqual(await work(newAddress()));
    expect(known).toMatchObject({ hashes: 1, letters: 1 });
    expect(known.statements.length).toBeGreaterThan(8);
  });
});

describe('the link to confirm an address', () => {
  test('works once, however often it is followed at the same time', async () => {
    const body = form();
    await people.browser().post('/api/sign-up').send(body).expect(200);
    const token = await people.linkTo(body.email);
    const answers = await Promise.all(Array.from({ length: 20 }, () => people.browser().post('/api/email/verify').send({ token })));
    expect(answers.filter(({ status }) => status === 200)).toHaveLength(1);
    expect(answers.filter(({ status }) => status === 422)).toHaveLength(19);
    const { id } = await memberOf(body.email);
    expect((await people.actsOf(id)).filter(({ act }) => act === 'account.verified')).toHaveLength(1);
  });

  test('works for 24 hours', async () => {
    const body = form();
    await people.browser().post('/api/sign-up').send(body).expect(200);
    const token = await people.linkTo(body.email);
    await LinkToken.query(people.knex)
      .findById(hashOfSecret(token))
      .patch({ expiresAt: people.knex.raw(`expires_at - interval '24 hours'`) });
    const response = await people.browser().post('/api/email/verify').send({ token }).expect(422);
    expect(response.body).toMatchObject({ errors: [{ path: ['token'] }] });
    expect((await memberOf(body.email)).emailVerifiedAt).toBeNull();
  });

  test('is stored as a hash alone, which is no link', async () => {
    const body = form();
    await people.browser().post('/api/sign-up').send(body).expect(200);
    const token = await people.linkTo(body.email);
    const { id } = await memberOf(body.email);
    const stored = await LinkToken.query(people.knex).findOne({ memberId: id }).throwIfNotFound();
    expect(stored.hash).toBe(hashOfSecret(token));
    expect(JSON.stringify(stored)).not.toContain(token);
    await people.browser().post('/api/email/verify').send({ token: stored.hash.slice(0, 43) }).expect(422);
    expect(people.log.text()).not.toContain(token);
  });

  test('does not set a password, nor does one for that confirm an address that is to change', async () => {
    const body = form();
    await people.browser().post('/api/sign-up').send(body).expect(200);
    const token = await people.linkTo(body.email);
    await people.browser().post('/api/password/reset').send({ token, password: 'yet another good password' }).expect(422);
    await people.browser().post('/api/email/verify').send({ token }).expect(200);
    await people.browser().post('/api/password/forgot').send({ email: body.email }).expect(200);
    await people.browser().post('/api/email/verify').send({ token: await people.linkTo(body.email) }).expect(422);
  });

  test.each([['', newSecret()], ['', 'x'], ['', ''], ['tampered', '']])('that is none (%s%s) is refused', async (_how, token) => {
    await people.browser().post('/api/email/verify').send({ token }).expect(422);
  });

  test('with one letter changed is none', async () => {
    const body = form();
    await people.browser().post('/api/sign-up').send(body).expect(200);
    const token = await people.linkTo(body.email);
    for (const at of [0, 21, 41]) {
      const tampered = token.slice(0, at) + (token[at] === 'A' ? 'B' : 'A') + token.slice(at + 1);
      await people.browser().post('/api/email/verify').send({ token: tampered }).expect(422);
    }
    await people.browser().post('/api/email/verify').send({ token }).expect(200);
  });
});
