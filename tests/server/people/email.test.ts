import { describe, expect, test } from 'vitest';
import { LinkToken } from '#db/models/link-token.ts';
import { Member } from '#db/models/member.ts';
import { hashOfSecret } from '#server/services/people/secrets.ts';
import { PASSWORD, usePeople } from '#tests/support/people.ts';

const people = usePeople();
let addresses = 0;

function newAddress(): string {
  addresses += 1;
  return `moved-${addresses}@bench.example`;
}

describe('changing the address', () => {
  test('waits for the new one to be confirmed and tells the old one', async () => {
    const member = await people.addMember();
    const email = newAddress();
    const browser = await people.signedIn(member);
    await browser.put('/api/me/email').send({ password: PASSWORD, email }).expect(200, { done: true });
    expect((await browser.get('/api/me')).body).toMatchObject({ me: { email: member.email } });
    expect(await people.lettersTo(member.email)).toMatchObject([{ template: 'address-changing', data: { newAddress: email } }]);
    expect((await people.lettersTo(email)).map(({ template }) => template)).toEqual(['confirm-new-address']);

    await people.browser().post('/api/email/verify').send({ token: await people.linkTo(email) }).expect(200);
    expect((await browser.get('/api/me')).body).toMatchObject({ me: { email } });
    await people.browser().post('/api/sign-in').send({ email: member.email, password: PASSWORD }).expect(401);
    await people.browser().post('/api/sign-in').send({ email, password: PASSWORD }).expect(200);
    const acts = await people.actsOf(member.id);
    expect(acts.map(({ act }) => act)).toEqual(['session.started', 'email.change-asked', 'email.changed', 'session.started']);
    expect(JSON.stringify(acts)).not.toContain('@');
  });

  test('voids links that went to the old one', async () => {
    const member = await people.addMember();
    const email = newAddress();
    const browser = await people.signedIn(member);
    await browser.put('/api/me/email').send({ password: PASSWORD, email }).expect(200);
    await people.browser().post('/api/password/forgot').send({ email: member.email }).expect(200);
    const reset = await people.linkTo(member.email);
    await people.browser().post('/api/email/verify').send({ token: await people.linkTo(email) }).expect(200);
    await people.browser().post('/api/password/reset').send({ token: reset, password: 'set by the old mailbox' }).expect(422);
  });

  test('of which the link is void, once used, replaced, or a day old, changes nothing', async () => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    const [first, second] = [newAddress(), newAddress()];
    await browser.put('/api/me/email').send({ password: PASSWORD, email: first }).expect(200);
    await browser.put('/api/me/email').send({ password: PASSWORD, email: second }).expect(200);
    await people.browser().post('/api/email/verify').send({ token: await people.linkTo(first) }).expect(422);
    const token = await people.linkTo(second);
    await LinkToken.query(people.knex)
      .findById(hashOfSecret(token))
      .patch({ expiresAt: people.knex.raw(`expires_at - interval '24 hours'`) });
    await people.browser().post('/api/email/verify').send({ token }).expect(422);
    expect((await browser.get('/api/me')).body).toMatchObject({ me: { email: member.email } });
  });

  test('to another member’s looks the same, tells them, and gives no link', async () => {
    const other = await people.addMember();
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    const taken = await browser.put('/api/me/email').send({ password: PASSWORD, email: other.email });
    const free = await browser.put('/api/me/email').send({ password: PASSWORD, email: newAddress() });
    expect(taken.status).toBe(200);
    expect(taken.body).toEqual(free.body);
    expect(await people.lettersTo(other.email)).toMatchObject([{ template: 'already-known' }]);
    expect((await people.lettersTo(member.email)).map(({ template }) => template)).toEqual(['address-changing', 'address-changing']);
  });

  test('to one that somebody took meanwhile is refused when it is confirmed, and the link stays', async () => {
    const email = newAddress();
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    await browser.put('/api/me/email').send({ password: PASSWORD, email }).expect(200);
    await people.addMember({ email });
    const token = await people.linkTo(email);
    const response = await people.browser().post('/api/email/verify').send({ token }).expect(409);
    expect(response.body).toMatchObject({ type: '/problems/conflict' });
    expect((await Member.query(people.knex).findById(member.id))?.email).toBe(member.email);
  });

  test('to the same in other letters is taken for a change', async () => {
    const member = await people.addMember({ email: 'small.letters@bench.example' });
    const browser = await people.signedIn(member);
    await browser.put('/api/me/email').send({ password: PASSWORD, email: 'Small.Letters@bench.example' }).expect(200);
    await people.browser().post('/api/email/verify').send({ token: await people.linkTo('Small.Letters@bench.example') }).expect(200);
    expect((await Member.query(people.knex).findById(member.id))?.email).toBe('Small.Letters@bench.example');
  });

  test.each([
    ['a wrong password', { password: 'not the password', email: 'x@bench.example' }, 403, 'password'],
    ['no password', { email: 'x@bench.example' }, 422, 'password'],
    ['two addresses', { password: PASSWORD, email: 'x@bench.example,y@bench.example' }, 422, 'email'],
    ['a header', { password: PASSWORD, email: 'x@bench.example\r\nBcc: y@bench.example' }, 422, 'email'],
  ])('with %s is refused at that field', async (_what, body, status, field) => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    const response = await browser.put('/api/me/email').send(body).expect(status);
    expect(response.body).toMatchObject({ errors: [{ path: [field] }] });
    expect(await people.lettersTo(member.email)).toEqual([]);
  });

  test('to the present one is refused', async () => {
    const member = await people.addMember();
    const browser = await people.signedIn(member);
    await browser.put('/api/me/email').send({ password: PASSWORD, email: member.email }).expect(422);
  });

  test('is nothing a visitor can do', async () => {
    await people.browser().put('/api/me/email').send({ password: PASSWORD, email: newAddress() }).expect(401);
  });
});
