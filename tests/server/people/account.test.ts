import { TOTP, Secret } from 'otpauth';
import { describe, expect, test } from 'vitest';
import { AuditRow } from '#db/models/audit-row.ts';
import { FactVersion } from '#db/models/fact-version.ts';
import { MailMessage } from '#db/models/mail-message.ts';
import { Maker } from '#db/models/maker.ts';
import { MemberScope } from '#db/models/member-scope.ts';
import { Member } from '#db/models/member.ts';
import { NoticeChoice } from '#db/models/notice-choice.ts';
import { Notice } from '#db/models/notice.ts';
import { RecoveryCode } from '#db/models/recovery-code.ts';
import { Session } from '#db/models/session.ts';
import { FORMER_MEMBER } from '#db/vocabulary.ts';
import { notify } from '#server/services/notices/notify.ts';
import { hashOfSecret } from '#server/services/people/secrets.ts';
import { PASSWORD, sessionOf, TOTP_SECRET, usePeople } from '#tests/support/people.ts';

const people = usePeople();

/** A member with something of everything, in a browser where they are signed in in full. */
async function settledMember(displayName: string) {
  const member = await people.addMember({ displayName, role: 'moderator' });
  const { knex } = people;
  const maker = await Maker.query(knex).findOne({ slug: 'brackwater-tractor-works' }).throwIfNotFound();
  await Member.query(knex).findById(member.id).patch({ scope: 'some' });
  await MemberScope.query(knex).insert({ memberId: member.id, makerId: maker.id });
  await RecoveryCode.query(knex).insert({ memberId: member.id, hash: hashOfSecret(`${member.id} code`) });
  await knex.transaction((trx) =>
    notify({ memberId: member.id, kind: 'message', title: `For ${displayName}`, body: `Only ${displayName} reads this`, href: null }, trx),
  );
  await NoticeChoice.query(knex).insert({ memberId: member.id, kind: 'reading', byEmail: true });
  return { member, browser: await people.signedIn(member) };
}

/** A fact of the demo, entered once more by the member. */
async function enterSomething(memberId: string): Promise<void> {
  const fact = await FactVersion.query(people.knex).where({ kind: 'maker' }).whereNull('supersededAt').first().throwIfNotFound();
  await people.knex.transaction(async (trx) => {
    await FactVersion.query(trx)
      .where({ factId: fact.factId, number: fact.number })
      .patch({ supersededAt: trx.raw('now()') });
    await FactVersion.query(trx).insert({
      factId: fact.factId,
      kind: fact.kind,
      number: fact.number + 1,
      payload: fact.payload,
      citations: fact.citations,
      enteredById: memberId,
      enteredAt: '2026-11-30T10:00:00Z',
      reason: 'Seen on the plate',
    });
  });
}

describe('who one is', () => {
  test('is nobody for a visitor', async () => {
    await people.browser().get('/api/me').expect(200, { me: null });
  });

  test('with the makers one decides for, what one has to sign in with, and notices not read', async () => {
    const { browser } = await settledMember('Wren Holloway');
    const response = await browser.get('/api/me').expect(200);
    expect(response.headers['cache-control']).toBe('no-store');
    expect(response.headers['vary']).toMatch(/cookie/i);
    expect(response.body).toMatchObject({
      me: {
        displayName: 'Wren Holloway',
        role: 'moderator',
        moderates: [{ slug: 'brackwater-tractor-works', name: 'Brackwater Tractor Works' }],
        secondFactors: { authenticator: false, passkeys: 0, recoveryCodesLeft: 1 },
        secondFactorOwed: true,
        unreadNotices: 1,
      },
    });
  });
});

describe('the name shown', () => {
  test('can be changed; the trail says that, and not what it was', async () => {
    const member = await people.addMember({ displayName: 'Old Name Here' });
    const browser = await people.signedIn(member);
    expect((await browser.put('/api/me/name').send({ displayName: '  Sedge Marlow ' }).expect(200)).body).toMatchObject({
      displayName: 'Sedge Marlow',
    });
    const act = (await people.actsOf(member.id)).at(-1);
    expect(act).toMatchObject({ act: 'account.renamed', actorId: member.id, detail: {} });
  });

  test.each(['', ' ', 'x', 'x'.repeat(61), 'a\nb', '<script>', 'a\u200bb'])('is refused: %j', async (displayName) => {
    const member = await people.addMember({ displayName: 'Stays As It Is' });
    const browser = await people.signedIn(member);
    await browser.put('/api/me/name').send({ displayName }).expect(422);
    expect((await Member.query(people.knex).findById(member.id))?.displayName).toBe('Stays As It Is');
  });

  test('is nothing a visitor changes', async () => {
    await people.browser().put('/api/me/name').send({ displayName: 'Sedge Marlow' }).expect(401);
  });
});

describe('the export', () => {
  test('has everything of one’s own, and no secret', async () => {
    const { member, browser } = await settledMember('Marram Teal');
    await enterSomething(member.id);
    await people.browser().post('/api/password/forgot').send({ email: member.email }).expect(200);
    const response = await browser.get('/api/me/export').expect(200);
    expect(response.headers['cache-control']).toBe('no-store');
    expect(response.body).toMatchObject({
      account: { id: member.id, displayName: 'Marram Teal', email: member.email, role: 'moderator', moderates: ['brackwater-tractor-works'] },
      secondFactors: { authenticator: false, recoveryCodesLeft: 1, passkeys: [] },
      sessions: [{ strength: 'password' }],
      notices: [{ title: 'For Marram Teal' }],
      noticesByEmail: [{ kind: 'reading', byEmail: true }],
      letters: [
        { letter: 'notice', to: member.email },
        { letter: 'set-new-password', to: member.email },
      ],
      entered: { facts: [{ kind: 'maker', reason: 'Seen on the plate' }] },
      acts: [
        { act: 'session.started', byMe: true },
        { act: 'password.reset-asked', byMe: false, aboutMe: true },
        { act: 'account.exported', byMe: true },
      ],
    });
    const secrets = [String(sessionOf(browser)), await people.linkTo(member.email), hashOfSecret(`${member.id} code`), '$argon2id$'];
    for (const secret of secrets) expect(response.text).not.toContain(secret);
  });

  test('has nothing of anybody else', async () => {
    const other = await settledMember('Canary Ouzel');
    await enterSomething(other.member.id);
    const member = await people.addMember({ displayName: 'Fitch Garland' });
    const browser = await people.signedIn(member);
    const { text } = await browser.get('/api/me/export').expect(200);
    expect(text).toContain('Fitch Garland');
    for (const canary of ['Canary', other.member.email, other.member.id]) expect(text).not.toContain(canary);
  });

  test('is nobody’s for a visitor', async () => {
    await people.browser().get('/api/me/export').expect(401);
  });
});

describe('closing an account', () => {
  test('takes everything personal away and leaves what was entered under a former member', async () => {
    const { member, browser } = await settledMember('Gannet Crake');
    const other = await people.signedIn(member);
    await enterSomething(member.id);
    await people.browser().post('/api/password/forgot').send({ email: member.email }).expect(200);
    const token = await people.linkTo(member.email);
    const response = await browser.post('/api/me/close').send({ password: PASSWORD }).expect(200, { done: true });
    expect(response.headers['set-cookie']?.[0]).toMatch(/^session=;/);

    await other.get('/api/me/sessions').expect(401);
    await people.browser().post('/api/sign-in').send({ email: member.email, password: PASSWORD }).expect(401);
    await people.browser().post('/api/password/reset').send({ token, password: 'back from the dead, it seems' }).expect(422);
    expect(await Member.query(people.knex).findById(member.id)).toMatchObject({
      displayName: FORMER_MEMBER,
      email: null,
      passwordHash: null,
      role: 'member',
      scope: 'none',
    });
    expect(await FactVersion.query(people.knex).where({ enteredById: member.id }).resultSize()).toBe(1);
    for (const table of [Session, Notice, NoticeChoice, RecoveryCode, MemberScope]) {
      expect(await people.knex(table.tableName).where({ memberId: member.id })).toEqual([]);
    }
    expect((await people.actsOf(member.id)).at(-1)).toMatchObject({ act: 'account.closed', actorId: member.id });
  });

  test('leaves no trace of name or address in any table but the last letter', async () => {
    const { member, browser } = await settledMember('Dunlin Sanderling');
    await browser.put('/api/me/email').send({ password: PASSWORD, email: 'dunlin.elsewhere@bench.example' }).expect(200);
    await browser.post('/api/me/close').send({ password: PASSWORD }).expect(200);
    const [letter] = await people.lettersTo(member.email);
    expect(letter).toMatchObject({ template: 'account-closed', memberId: null });
    await MailMessage.query(people.knex)
      .findById(String(letter?.id))
      .patch({ state: 'sent', data: null, toAddress: null, settledAt: people.knex.raw('now()') });

    const tables = await people.knex<{ schemaname: string; tablename: string }>('pg_tables').where('schemaname', 'public').pluck('tablename');
    expect(tables.length).toBeGreaterThan(20);
    for (const table of tables) {
      for (const canary of ['Dunlin Sanderling', member.email, 'dunlin.elsewhere@bench.example']) {
        const holding = await people.knex(table).whereRaw('strpos(??::text, ?) > 0', [table, canary]);
        expect(holding, `${table} holds ${canary}`).toEqual([]);
      }
    }
  });

  test('frees the address for a new account', async () => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    await browser.post('/api/me/close').send({ password: PASSWORD }).expect(200);
    await people.browser().post('/api/sign-up').send({ displayName: 'Back Again', email: member.email, password: PASSWORD }).expect(200);
    expect((await people.lettersTo(member.email))[0]).toMatchObject({ template: 'confirm-address' });
  });

  test('needs the password', async () => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    const response = await browser.post('/api/me/close').send({ password: 'not the password' }).expect(403);
    expect(response.body).toMatchObject({ errors: [{ path: ['password'] }] });
    await browser.post('/api/me/close').send({}).expect(422);
    await people.browser().post('/api/me/close').send({ password: PASSWORD }).expect(401);
    await browser.get('/api/me/sessions').expect(200);
  });
});

describe('a code from the authenticator', () => {
  test('proves who one is, once', async () => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    await people.knex('authenticators').insert({ memberId: member.id, secret: TOTP_SECRET, confirmedAt: people.knex.raw('now()'), lastStep: 0 });
    const before = sessionOf(browser);
    const code = new TOTP({ secret: Secret.fromBase32(TOTP_SECRET) }).generate();
    await browser.post('/api/me/confirm').send({ way: 'authenticator', code }).expect(200);
    expect(sessionOf(browser)).not.toBe(before);
    const again = await browser.post('/api/me/confirm').send({ way: 'authenticator', code }).expect(403);
    expect(again.body).toMatchObject({ errors: [{ path: ['code'] }] });
  });

  test('that is wrong, or of somebody without one, is refused and slowed down', async () => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    for (let round = 0; round < 5; round += 1) await browser.post('/api/me/confirm').send({ way: 'authenticator', code: '000000' }).expect(403);
    await browser.post('/api/me/confirm').send({ way: 'authenticator', code: '000000' }).expect(429);
  });
});

test('every act of a request names the request', async () => {
  const member = await people.addMember();
  const browser = await people.signedIn(member);
  const response = await browser.post('/api/me/sessions/end-others').set('X-Request-Id', 'a-request-of-mine').expect(200);
  expect(response.headers['x-request-id']).toBe('a-request-of-mine');
  expect(await AuditRow.query(people.knex).where({ requestId: 'a-request-of-mine' })).toHaveLength(1);
});
