import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { Member } from '#db/models/member.ts';
import { Passkey } from '#db/models/passkey.ts';
import { Session } from '#db/models/session.ts';
import { WebauthnChallenge } from '#db/models/webauthn-challenge.ts';
import { ORIGIN, sessionOf, usePeople } from '#tests/support/people.ts';
import { pathsOf, problemOf } from '#tests/support/problem.ts';
import { ageProof } from '#tests/support/second-factors.ts';
import { softwareAuthenticator, statementWithCertificate } from '#tests/support/software-authenticator.ts';
import type { Bend } from '#tests/support/software-authenticator.ts';

const people = usePeople();
type Browser = ReturnType<typeof people.browser>;
type Device = ReturnType<typeof softwareAuthenticator>;

const Added = z.strictObject({
  passkey: z.strictObject({ id: z.uuid(), name: z.string(), addedAt: z.string(), lastUsedAt: z.null() }),
  recoveryCodes: z.array(z.string()),
});

async function newOptions(browser: Browser): Promise<unknown> {
  return (await browser.post('/api/me/passkeys/options').send().expect(200)).body;
}

async function signInOptions(browser: Browser): Promise<unknown> {
  return (await browser.post('/api/sign-in/passkey/options').send().expect(200)).body;
}

async function add(browser: Browser, device: Device, name = 'Bench laptop') {
  const response = device.register(await newOptions(browser));
  return Added.parse((await browser.post('/api/me/passkeys').send({ name, response }).expect(201)).body);
}

/** A member with a passkey, the device that holds it, and the browser it was added in. */
async function withPasskey(member?: Parameters<typeof people.addMember>[0]) {
  const holder = await people.addMember(member);
  const browser = await people.signedIn(holder);
  const device = softwareAuthenticator(ORIGIN);
  const added = await add(browser, device);
  return { member: holder, browser, device, ...added };
}

async function signIn(browser: Browser, device: Device, bend: Bend = {}) {
  const response = device.assert(await signInOptions(browser), bend);
  return browser.post('/api/sign-in/passkey').send({ response });
}

describe('adding a passkey', () => {
  test('asks for one that knows its user and can be found without an address', async () => {
    const member = await people.addMember({ displayName: 'Sorrel Vane' });
    const options = await newOptions(await people.signedIn(member));
    expect(options).toMatchObject({
      rp: { id: '127.0.0.1', name: 'Pourbook' },
      user: { name: member.email, displayName: 'Sorrel Vane' },
      attestation: 'none',
      authenticatorSelection: { residentKey: 'required', requireResidentKey: true, userVerification: 'required' },
      excludeCredentials: [],
    });
    const { challenge } = z.object({ challenge: z.string() }).parse(options);
    expect(Buffer.from(challenge, 'base64url').length).toBeGreaterThanOrEqual(32);
  });

  test('keeps it, gives recovery codes and a stronger session, ends the others and tells the member', async () => {
    const member = await people.addMember();
    const elsewhere = await people.signedIn(member);
    const browser = await people.signedIn(member);
    const before = sessionOf(browser);
    const device = softwareAuthenticator(ORIGIN);
    const { passkey, recoveryCodes } = await add(browser, device);
    expect(passkey.name).toBe('Bench laptop');
    expect(recoveryCodes).toHaveLength(10);
    expect(sessionOf(browser)).not.toBe(before);
    expect((await elsewhere.get('/api/me')).body).toEqual({ me: null });
    expect(await Session.query(people.knex).where({ memberId: member.id })).toMatchObject([{ strength: 'second-factor' }]);
    expect(await Passkey.query(people.knex).findById(passkey.id)).toMatchObject({ memberId: member.id, credentialId: device.credentialId, counter: '1', transports: ['internal'] });
    expect((await browser.get('/api/me/passkeys').expect(200)).body).toEqual({ items: [passkey] });
    expect((await people.lettersTo(member.email))[0]).toMatchObject({ template: 'second-factor-changed', data: { change: 'passkey-added' } });
    expect((await people.actsOf(member.id)).at(-1)).toMatchObject({ act: 'second-factor.added', detail: { way: 'passkey' } });
    expect(await newOptions(browser)).toMatchObject({ excludeCredentials: [{ id: device.credentialId }] });
  });

  test('gives no codes where some are left', async () => {
    const { browser } = await withPasskey();
    expect((await add(browser, softwareAuthenticator(ORIGIN), 'Key on the ring')).recoveryCodes).toEqual([]);
  });

  test.each<[string, Bend]>([
    ['another origin', { origin: 'http://127.0.0.1:5081' }],
    ['another host', { rpId: 'elsewhere.example' }],
    ['another challenge', { challenge: 'A'.repeat(43) }],
    ['a device that does not know its user', { userVerified: false }],
    ['what was made to sign in', { type: 'webauthn.get' }],
    ['certificates', { attestation: { format: 'packed', statement: statementWithCertificate() } }],
  ])('refuses %s', async (_what, bend) => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    const response = softwareAuthenticator(ORIGIN).register(await newOptions(browser), bend);
    const problem = await problemOf(browser.post('/api/me/passkeys').send({ name: 'A key', response }), 422);
    expect(pathsOf(problem)).toEqual(['response']);
    expect(await Passkey.query(people.knex).where({ memberId: member.id }).resultSize()).toBe(0);
  });

  test.each([{}, { id: 'x' }, { id: 'x', rawId: 'x', type: 'public-key', response: { clientDataJSON: '!!', attestationObject: '' } }])(
    'refuses %j',
    async (response) => {
      const browser = await people.signedIn(await people.addMember());
      await problemOf(browser.post('/api/me/passkeys').send({ name: 'A key', response }), 422);
    },
  );

  test('takes a challenge once, and not after its time', async () => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    const device = softwareAuthenticator(ORIGIN);
    const options = await newOptions(browser);
    const wrong = device.register(options, { origin: 'https://elsewhere.example' });
    await problemOf(browser.post('/api/me/passkeys').send({ name: 'A key', response: wrong }), 422);
    await problemOf(browser.post('/api/me/passkeys').send({ name: 'A key', response: device.register(options) }), 422);

    const late = await newOptions(browser);
    await WebauthnChallenge.query(people.knex).where({ memberId: member.id }).patch({ expiresAt: people.knex.raw('now()') });
    await problemOf(browser.post('/api/me/passkeys').send({ name: 'A key', response: device.register(late) }), 422);
  });

  test('takes a challenge from nobody but the member it was given to', async () => {
    const options = await newOptions(await people.signedIn(await people.addMember()));
    const browser = await people.signedIn(await people.addMember());
    const response = softwareAuthenticator(ORIGIN).register(options);
    await problemOf(browser.post('/api/me/passkeys').send({ name: 'A key', response }), 422);
  });

  test('refuses one that is on record', async () => {
    const { device } = await withPasskey();
    const browser = await people.signedIn(await people.addMember());
    const response = device.register(await newOptions(browser));
    await problemOf(browser.post('/api/me/passkeys').send({ name: 'A key', response }), 409);
  });

  test('asks for a recent proof, first and last', async () => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    const response = softwareAuthenticator(ORIGIN).register(await newOptions(browser));
    await ageProof(member.id, people.knex);
    await problemOf(browser.post('/api/me/passkeys/options').send(), 403);
    const problem = await problemOf(browser.post('/api/me/passkeys').send({ name: 'A key', response }), 403);
    expect(problem.type).toBe('/problems/identity-not-confirmed');
  });

  test('is for whoever is signed in', async () => {
    await problemOf(people.browser().post('/api/me/passkeys/options').send(), 401);
    await problemOf(people.browser().get('/api/me/passkeys'), 401);
  });
});

describe('signing in with a passkey', () => {
  test('alone is as good as with a second factor', async () => {
    const { member, device } = await withPasskey({ role: 'registrar' });
    const browser = people.browser();
    expect(await signInOptions(browser)).toMatchObject({ rpId: '127.0.0.1', userVerification: 'required', allowCredentials: [] });
    const answer = await signIn(browser, device);
    expect(answer.status).toBe(200);
    expect(answer.body).toMatchObject({ state: 'signed-in', me: { id: member.id, secondFactorOwed: false, can: { seeMembers: true } } });
    await browser.get('/api/admin/members').expect(200);
    expect(await Passkey.query(people.knex).findOne({ memberId: member.id })).toMatchObject({ counter: '2', lastUsedAt: expect.any(String) as unknown });
    expect((await people.actsOf(member.id)).at(-1)).toMatchObject({ act: 'session.started', detail: { strength: 'second-factor' } });
  });

  test('finishes what the password began, with one of the member’s own', async () => {
    const { member, device } = await withPasskey();
    const browser = people.browser();
    const answer = await browser.post('/api/sign-in').send({ email: member.email, password: 'rivet, boss and draft angle' }).expect(200);
    expect(answer.body).toEqual({ state: 'second-factor', ways: ['passkey', 'recovery-code'] });
    expect(await signInOptions(browser)).toMatchObject({ allowCredentials: [{ id: device.credentialId, transports: ['internal'] }] });
    expect((await signIn(browser, device, { userHandle: null })).status).toBe(200);
    expect((await browser.get('/api/me')).body).toMatchObject({ me: { id: member.id } });
  });

  test('does not finish it with another member’s', async () => {
    const { member } = await withPasskey();
    const { device } = await withPasskey();
    const browser = await people.signedIn(member);
    expect((await signIn(browser, device)).status).toBe(401);
    expect((await browser.get('/api/me')).body).toEqual({ me: null });
  });

  test.each<[string, Bend]>([
    ['another origin', { origin: 'https://127.0.0.1:5080' }],
    ['another host', { rpId: 'elsewhere.example' }],
    ['another challenge', { challenge: 'B'.repeat(43) }],
    ['a device that does not know its user', { userVerified: false }],
    ['what was made to add one', { type: 'webauthn.create' }],
    ['a counter that stands still', { counter: 1 }],
    ['a counter that went back', { counter: 0 }],
    ['another member’s name', { userHandle: Buffer.from('01939393-0000-7000-8000-000000000000').toString('base64url') }],
    ['nobody’s name', { userHandle: null }],
  ])('refuses %s', async (_what, bend) => {
    const { member, device } = await withPasskey();
    const browser = people.browser();
    const answer = await signIn(browser, device, bend);
    expect(answer.status).toBe(401);
    expect((await browser.get('/api/me')).body).toEqual({ me: null });
    expect((await people.actsOf(member.id)).at(-1)).toMatchObject({ act: 'session.refused', actorId: null, detail: { reason: 'wrong-passkey' } });
    expect(await Passkey.query(people.knex).findOne({ memberId: member.id })).toMatchObject({ counter: '1', lastUsedAt: null });
  });

  test('takes an answer once, be it sent twenty times at once', async () => {
    const { member, device } = await withPasskey();
    const response = device.assert(await signInOptions(people.browser()));
    const answers = await Promise.all(Array.from({ length: 20 }, () => people.browser().post('/api/sign-in/passkey').send({ response })));
    expect(answers.filter(({ status }) => status === 200)).toHaveLength(1);
    const again = await people.browser().post('/api/sign-in/passkey').send({ response });
    expect([401, 429]).toContain(again.status);
    expect(await Session.query(people.knex).where({ memberId: member.id, strength: 'second-factor' }).resultSize()).toBe(2);
  });

  test('refuses a challenge past its time, and one that was for adding', async () => {
    const { browser, device } = await withPasskey();
    const visitor = people.browser();
    const late = await signInOptions(visitor);
    await WebauthnChallenge.query(people.knex).patch({ expiresAt: people.knex.raw('now()') });
    expect((await visitor.post('/api/sign-in/passkey').send({ response: device.assert(late) })).status).toBe(401);
    const { challenge } = z.object({ challenge: z.string() }).parse(await newOptions(browser));
    const response = device.assert({ challenge, rpId: '127.0.0.1' });
    expect((await visitor.post('/api/sign-in/passkey').send({ response })).status).toBe(401);
  });

  test('refuses one nobody added, and one that was removed', async () => {
    const stranger = softwareAuthenticator(ORIGIN);
    expect((await signIn(people.browser(), stranger, { userHandle: 'AAAA' })).status).toBe(401);
    const { browser, device, passkey } = await withPasskey();
    await browser.delete(`/api/me/passkeys/${passkey.id}`).send().expect(200);
    expect((await signIn(people.browser(), device)).status).toBe(401);
  });

  test('is closed to whoever is suspended', async () => {
    const { member, device } = await withPasskey();
    const registrar = await people.addMember({ role: 'registrar' });
    const suspension = { suspendedAt: '2026-02-01T00:00:00Z', suspensionReason: 'For a test', suspendedById: registrar.id };
    await Member.query(people.knex).findById(member.id).patch(suspension);
    expect((await signIn(people.browser(), device)).status).toBe(403);
    expect((await people.actsOf(member.id)).at(-1)).toMatchObject({ act: 'session.refused', detail: { reason: 'suspended' } });
  });

  test('is closed to the demo’s accounts in production', async () => {
    const { device } = await withPasskey({ demo: true });
    const browser = people.browser({ app: people.anotherApp({ environment: 'production' }) });
    expect((await signIn(browser, device)).status).toBe(403);
    expect((await signIn(people.browser(), device)).status).toBe(200);
  });

  test.each([{}, { id: 'x', rawId: 'x', type: 'public-key', response: {} }])('refuses %j', async (response) => {
    await problemOf(people.browser().post('/api/sign-in/passkey').send({ response }), 422);
  });
});

describe('removing a passkey', () => {
  test('leaves the others, and codes and rights as they were', async () => {
    const { member, browser, passkey } = await withPasskey({ role: 'registrar' });
    const other = await add(browser, softwareAuthenticator(ORIGIN), 'Key on the ring');
    await browser.delete(`/api/me/passkeys/${passkey.id}`).send().expect(200);
    expect((await browser.get('/api/me/passkeys').expect(200)).body).toEqual({ items: [other.passkey] });
    expect((await browser.get('/api/me')).body).toMatchObject({ me: { secondFactors: { recoveryCodesLeft: 10 }, secondFactorOwed: false } });
    expect((await people.actsOf(member.id)).at(-1)).toMatchObject({ act: 'second-factor.removed', detail: { way: 'passkey' } });
    await browser.delete(`/api/me/passkeys/${other.passkey.id}`).send().expect(200);
    expect((await browser.get('/api/me')).body).toMatchObject({ me: { secondFactors: { recoveryCodesLeft: 0 }, secondFactorOwed: true } });
  });

  test('finds nobody else’s', async () => {
    const { passkey } = await withPasskey();
    const browser = await people.signedIn(await people.addMember());
    await problemOf(browser.delete(`/api/me/passkeys/${passkey.id}`).send(), 404);
    expect(await Passkey.query(people.knex).findById(passkey.id)).toBeDefined();
  });

  test('asks for a recent proof', async () => {
    const { member, browser, passkey } = await withPasskey();
    await ageProof(member.id, people.knex);
    await problemOf(browser.delete(`/api/me/passkeys/${passkey.id}`).send(), 403);
  });
});
