import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { Authenticator } from '#db/models/authenticator.ts';
import { Member } from '#db/models/member.ts';
import { Notice } from '#db/models/notice.ts';
import { RecoveryCode } from '#db/models/recovery-code.ts';
import { Session } from '#db/models/session.ts';
import { PASSWORD, sessionOf, usePeople } from '#tests/support/people.ts';
import { pathsOf, problemOf } from '#tests/support/problem.ts';
import { ageProof, codeOfNow, signedInFully, wrongCode } from '#tests/support/second-factors.ts';

const people = usePeople();
const Started = z.strictObject({ secret: z.string(), uri: z.string(), qr: z.string() });
const Codes = z.strictObject({ recoveryCodes: z.array(z.string()) });
const RECOVERY_CODE = /^[A-HJ-NP-Z2-9]{4}(?:-[A-HJ-NP-Z2-9]{4}){3}$/;

async function start(browser: ReturnType<typeof people.browser>) {
  return Started.parse((await browser.post('/api/me/authenticator').send().expect(200)).body);
}

async function factorsOf(browser: ReturnType<typeof people.browser>) {
  const answer = await browser.get('/api/me').expect(200);
  return z.object({ me: z.object({ secondFactors: z.unknown(), secondFactorOwed: z.boolean(), can: z.unknown() }) }).parse(answer.body).me;
}

describe('adding an authenticator', () => {
  test('shows its secret as text, address and image', async () => {
    const member = await people.addMember();
    const { secret, uri, qr } = await start(await people.signedIn(member));
    expect(secret).toMatch(/^[A-Z2-7]{32}$/);
    const address = new URL(uri);
    expect(`${address.protocol}//${address.host}`).toBe('otpauth://totp');
    expect(decodeURIComponent(address.pathname)).toBe(`/Pourbook:${member.email}`);
    expect(Object.fromEntries(address.searchParams)).toEqual({ issuer: 'Pourbook', secret, algorithm: 'SHA1', digits: '6', period: '30' });
    expect(qr).toMatch(/^data:image\/png;base64,[\w+/]+=*$/);
  });

  test('counts for nothing before a first code', async () => {
    const member = await people.addMember();
    await start(await people.signedIn(member));
    const answer = await people.browser().post('/api/sign-in').send({ email: member.email, password: PASSWORD }).expect(200);
    expect(answer.body).toMatchObject({ state: 'signed-in' });
  });

  test('with a first code gives recovery codes, a new session, and ends the others', async () => {
    const member = await people.addMember();
    const elsewhere = await people.signedIn(member);
    const browser = await people.signedIn(member);
    const before = sessionOf(browser);
    const { secret } = await start(browser);
    const answer = await browser.post('/api/me/authenticator/confirm').send({ code: await codeOfNow(people.knex, { secret }) }).expect(200);
    const { recoveryCodes } = Codes.parse(answer.body);
    expect(new Set(recoveryCodes).size).toBe(10);
    for (const code of recoveryCodes) expect(code).toMatch(RECOVERY_CODE);
    expect(sessionOf(browser)).not.toBe(before);
    expect(await factorsOf(browser)).toMatchObject({ secondFactors: { authenticator: true, passkeys: 0, recoveryCodesLeft: 10 } });
    expect((await elsewhere.get('/api/me')).body).toEqual({ me: null });
    const [session, ...others] = await Session.query(people.knex).where({ memberId: member.id });
    expect(others).toEqual([]);
    expect(session?.strength).toBe('second-factor');

    const [letter] = await people.lettersTo(member.email);
    expect(letter).toMatchObject({ template: 'second-factor-changed', data: { change: 'authenticator-added' } });
    expect(await Notice.query(people.knex).where({ memberId: member.id })).toMatchObject([{ kind: 'account', title: 'An authenticator was added to your account' }]);
    const acts = await people.actsOf(member.id);
    expect(acts.at(-1)).toMatchObject({ act: 'second-factor.added', actorId: member.id, detail: { way: 'authenticator', otherSessionsEnded: 1 } });

    const kept = JSON.stringify(await RecoveryCode.query(people.knex).where({ memberId: member.id }));
    for (const code of recoveryCodes) expect(kept).not.toContain(code);
    expect(people.log.text()).not.toContain(secret);
    expect(JSON.stringify(acts)).not.toContain(secret);
  });

  test('refuses a code that is not of now, and changes nothing', async () => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    const { secret } = await start(browser);
    const problem = await problemOf(browser.post('/api/me/authenticator/confirm').send({ code: await wrongCode(people.knex, secret) }), 422);
    expect(pathsOf(problem)).toEqual(['code']);
    expect((await factorsOf(browser)).secondFactors).toMatchObject({ authenticator: false, recoveryCodesLeft: 0 });
    expect(await people.lettersTo(member.email)).toEqual([]);
  });

  test('refuses the code of a secret that a newer one replaced', async () => {
    const browser = await people.signedIn(await people.addMember());
    const { secret } = await start(browser);
    await start(browser);
    await problemOf(browser.post('/api/me/authenticator/confirm').send({ code: await codeOfNow(people.knex, { secret }) }), 422);
  });

  test('slows guesses down', async () => {
    const browser = await people.signedIn(await people.addMember());
    const { secret } = await start(browser);
    for (let guess = 0; guess < 5; guess += 1) {
      await problemOf(browser.post('/api/me/authenticator/confirm').send({ code: await wrongCode(people.knex, secret) }), 422);
    }
    await problemOf(browser.post('/api/me/authenticator/confirm').send({ code: await codeOfNow(people.knex, { secret }) }), 429);
  });

  test('refuses one beside another, and a code where none was begun', async () => {
    const member = await people.addMember({ authenticator: true });
    const browser = await signedInFully(people, member);
    await problemOf(browser.post('/api/me/authenticator').send(), 409);
    await problemOf(browser.post('/api/me/authenticator/confirm').send({ code: '123456' }), 409);
  });

  test('asks for a recent proof', async () => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    const { secret } = await start(browser);
    await ageProof(member.id, people.knex);
    const stale = await problemOf(browser.post('/api/me/authenticator').send(), 403);
    expect(stale.type).toBe('/problems/identity-not-confirmed');
    const code = await codeOfNow(people.knex, { secret });
    expect((await problemOf(browser.post('/api/me/authenticator/confirm').send({ code }), 403)).type).toBe('/problems/identity-not-confirmed');
    await browser.post('/api/me/confirm').send({ way: 'password', password: PASSWORD }).expect(200);
    await browser.post('/api/me/authenticator/confirm').send({ code }).expect(200);
  });

  test('is nobody’s who is not signed in, or has the second factor still to give', async () => {
    await problemOf(people.browser().post('/api/me/authenticator').send(), 401);
    const member = await people.addMember({ authenticator: true });
    const halfWay = await people.signedIn(member);
    await problemOf(halfWay.delete('/api/me/authenticator').send(), 401);
    await problemOf(halfWay.post('/api/me/recovery-codes').send(), 401);
  });
});

describe('the second step of signing in', () => {
  test('takes a code, once', async () => {
    const member = await people.addMember({ authenticator: true });
    const browser = await people.signedIn(member);
    const other = await people.signedIn(member);
    const code = await codeOfNow(people.knex);
    const before = sessionOf(browser);
    const answer = await browser.post('/api/sign-in/second-factor').send({ way: 'authenticator', code }).expect(200);
    expect(answer.body).toMatchObject({ state: 'signed-in', me: { id: member.id } });
    expect(sessionOf(browser)).not.toBe(before);
    const replay = await problemOf(other.post('/api/sign-in/second-factor').send({ way: 'authenticator', code }), 403);
    expect(pathsOf(replay)).toEqual(['code']);
    expect((await other.get('/api/me')).body).toEqual({ me: null });
    expect((await people.actsOf(member.id)).map(({ act, detail }) => [act, detail])).toEqual([
      ['session.started', { strength: 'second-factor' }],
      ['session.refused', { reason: 'wrong-authenticator' }],
    ]);
  });

  test('takes the same code from one of twenty who send it at once', async () => {
    const member = await people.addMember({ authenticator: true });
    const browsers = [];
    for (let count = 0; count < 20; count += 1) browsers.push(await people.signedIn(member));
    const code = await codeOfNow(people.knex);
    const answers = await Promise.all(browsers.map((browser) => browser.post('/api/sign-in/second-factor').send({ way: 'authenticator', code })));
    expect(answers.filter(({ status }) => status === 200)).toHaveLength(1);
    expect(new Set(answers.map(({ status }) => status))).toEqual(new Set([200, 403, 429]));
    expect(await Session.query(people.knex).where({ memberId: member.id, stage: 'open' }).resultSize()).toBe(1);
  });

  test('slows guesses down, wherever they come from', async () => {
    const member = await people.addMember({ authenticator: true });
    for (let guess = 0; guess < 5; guess += 1) {
      const browser = await people.signedIn(member);
      await problemOf(browser.post('/api/sign-in/second-factor').send({ way: 'authenticator', code: await wrongCode(people.knex) }), 403);
    }
    const browser = await people.signedIn(member);
    const code = await codeOfNow(people.knex);
    const answer = await browser.post('/api/sign-in/second-factor').send({ way: 'authenticator', code });
    expect(answer.status).toBe(429);
    expect(Number(answer.headers['retry-after'])).toBeGreaterThan(0);
  });

  test('needs the password first', async () => {
    const code = await codeOfNow(people.knex);
    await problemOf(people.browser().post('/api/sign-in/second-factor').send({ way: 'authenticator', code }), 401);
  });

  test('is over when the account is suspended or the half-made session ended meanwhile', async () => {
    const registrar = await people.addMember({ role: 'registrar' });
    const member = await people.addMember({ authenticator: true });
    const browser = await people.signedIn(member);
    const suspension = { suspendedAt: '2026-02-01T00:00:00Z', suspensionReason: 'For a test', suspendedById: registrar.id };
    await Member.query(people.knex).findById(member.id).patch(suspension);
    const code = await codeOfNow(people.knex);
    await problemOf(browser.post('/api/sign-in/second-factor').send({ way: 'authenticator', code }), 401);
    await Member.query(people.knex).findById(member.id).patch({ suspendedAt: null, suspensionReason: null, suspendedById: null });
    await Session.query(people.knex).delete().where({ memberId: member.id });
    await problemOf(browser.post('/api/sign-in/second-factor').send({ way: 'authenticator', code }), 401);
  });
});

describe('recovery codes', () => {
  async function withCodes() {
    const member = await people.addMember({ authenticator: true });
    const browser = await signedInFully(people, member);
    const { recoveryCodes } = Codes.parse((await browser.post('/api/me/recovery-codes').send().expect(200)).body);
    return { member, browser, recoveryCodes };
  }
  const give = async (member: { email: string }, code: string) =>
    (await people.signedIn(member)).post('/api/sign-in/second-factor').send({ way: 'recovery-code', code });

  test('sign in once each, however they are typed, and the member is told', async () => {
    const { member, recoveryCodes } = await withCodes();
    const [code = ''] = recoveryCodes;
    const answer = await give(member, ` ${code.toLowerCase().replaceAll('-', ' ')} `);
    expect(answer.status).toBe(200);
    expect(answer.body).toMatchObject({ state: 'signed-in', me: { secondFactors: { recoveryCodesLeft: 9 } } });
    expect((await give(member, code)).status).toBe(403);
    expect((await people.lettersTo(member.email))[0]).toMatchObject({ data: { change: 'recovery-code-used' } });
    expect((await people.actsOf(member.id)).map(({ act }) => act)).toContain('recovery-code.used');
  });

  test('sign in one of twenty who send the same at once', async () => {
    const { member, recoveryCodes } = await withCodes();
    const [code = ''] = recoveryCodes;
    const browsers = [];
    for (let count = 0; count < 20; count += 1) browsers.push(await people.signedIn(member));
    const answers = await Promise.all(browsers.map((browser) => browser.post('/api/sign-in/second-factor').send({ way: 'recovery-code', code })));
    expect(answers.filter(({ status }) => status === 200)).toHaveLength(1);
  });

  test('of one member are of no use to another', async () => {
    const { recoveryCodes } = await withCodes();
    const other = await people.addMember({ authenticator: true });
    expect((await give(other, recoveryCodes[0] ?? '')).status).toBe(403);
  });

  test('stop working when new ones are made', async () => {
    const { member, browser, recoveryCodes } = await withCodes();
    const renewed = Codes.parse((await browser.post('/api/me/recovery-codes').send().expect(200)).body);
    expect(renewed.recoveryCodes).toHaveLength(10);
    expect((await give(member, recoveryCodes[0] ?? '')).status).toBe(403);
    expect((await give(member, renewed.recoveryCodes[0] ?? '')).status).toBe(200);
    expect((await people.actsOf(member.id)).filter(({ act }) => act === 'recovery-codes.renewed')).toHaveLength(2);
  });

  test('are not made where they stand in for nothing, or without a recent proof', async () => {
    const plain = await people.signedIn(await people.addMember());
    await problemOf(plain.post('/api/me/recovery-codes').send(), 409);
    const { member, browser } = await withCodes();
    await ageProof(member.id, people.knex);
    await problemOf(browser.post('/api/me/recovery-codes').send(), 403);
  });
});

describe('removing the authenticator', () => {
  test('takes the recovery codes along, ends other sessions and tells the member', async () => {
    const member = await people.addMember({ authenticator: true });
    const browser = await signedInFully(people, member);
    await browser.post('/api/me/recovery-codes').send().expect(200);
    await browser.delete('/api/me/authenticator').send().expect(200);
    expect((await factorsOf(browser)).secondFactors).toEqual({ authenticator: false, passkeys: 0, recoveryCodesLeft: 0 });
    expect(await Authenticator.query(people.knex).findById(member.id)).toBeUndefined();
    expect((await people.lettersTo(member.email))[0]).toMatchObject({ data: { change: 'authenticator-removed' } });
    expect((await people.actsOf(member.id)).at(-1)).toMatchObject({ act: 'second-factor.removed', detail: { way: 'authenticator' } });
    await problemOf(browser.delete('/api/me/authenticator').send(), 404);
  });

  test('leaves a registrar one who may not act', async () => {
    const registrar = await people.addMember({ role: 'registrar', authenticator: true });
    const browser = await signedInFully(people, registrar);
    await browser.get('/api/admin/members').expect(200);
    await browser.delete('/api/me/authenticator').send().expect(200);
    expect(await factorsOf(browser)).toMatchObject({ secondFactorOwed: true, can: { seeMembers: false, seeAudit: false } });
    expect((await problemOf(browser.get('/api/admin/members'), 403)).type).toBe('/problems/second-factor-owed');
  });

  test('asks for a recent proof', async () => {
    const member = await people.addMember({ authenticator: true });
    const browser = await signedInFully(people, member);
    await ageProof(member.id, people.knex);
    expect((await problemOf(browser.delete('/api/me/authenticator').send(), 403)).type).toBe('/problems/identity-not-confirmed');
  });
});

describe('a moderator without a second factor', () => {
  test('may not act until one is added, and then does in the same session', async () => {
    const moderator = await people.addMember({ role: 'moderator' });
    const browser = await people.signedIn(moderator);
    expect(await factorsOf(browser)).toMatchObject({ secondFactorOwed: true, can: { decideContributions: false } });
    const { secret } = await start(browser);
    await browser.post('/api/me/authenticator/confirm').send({ code: await codeOfNow(people.knex, { secret }) }).expect(200);
    expect(await factorsOf(browser)).toMatchObject({ secondFactorOwed: false, can: { decideContributions: true } });
  });
});
