import { describe, expect, test } from 'vitest';
import { Member } from '#db/models/member.ts';
import { makeRegistrar } from '#server/services/people/make-registrar.ts';
import { isLastRegistrar } from '#server/services/people/registrars.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { PASSWORD, usePeople } from '#tests/support/people.ts';
import { runScript } from '#tests/support/run-script.ts';

const people = usePeople();

/** The demo's own registrar and those of other tests are members from here on, the one left apart. */
async function leaveOne(id: string): Promise<void> {
  await Member.query(people.knex).whereNot({ id }).where({ role: 'registrar' }).patch({ role: 'member' });
}

function addRegistrar() {
  return people.addMember({ role: 'registrar' });
}

describe('the last registrar', () => {
  test('is told apart from one of several', async () => {
    const one = await addRegistrar();
    const other = await addRegistrar();
    await leaveOne(one.id);
    expect(await withTransaction(people.knex, (trx) => isLastRegistrar(one.id, trx))).toBe(true);
    expect(await withTransaction(people.knex, (trx) => isLastRegistrar(other.id, trx))).toBe(false);
    await Member.query(people.knex).findById(other.id).patch({ role: 'registrar' });
    expect(await withTransaction(people.knex, (trx) => isLastRegistrar(one.id, trx))).toBe(false);
  });

  test.each([
    ['demoted', { role: 'member' }],
    ['made a moderator', { role: 'moderator', scope: 'all' }],
  ] as const)('cannot be %s, not even by a statement of its own', async (_how, change) => {
    const registrar = await addRegistrar();
    await leaveOne(registrar.id);
    await expect(Member.query(people.knex).findById(registrar.id).patch(change)).rejects.toThrow(/the last registrar stays one/);
    expect((await Member.query(people.knex).findById(registrar.id))?.role).toBe('registrar');
  });

  test('cannot be suspended or deleted', async () => {
    const registrar = await addRegistrar();
    const member = await people.addMember();
    await leaveOne(registrar.id);
    const suspension = { suspendedAt: '2026-02-01T00:00:00Z', suspensionReason: 'For a test', suspendedById: member.id };
    await expect(Member.query(people.knex).findById(registrar.id).patch(suspension)).rejects.toThrow(/the last registrar stays one/);
    await expect(Member.query(people.knex).deleteById(registrar.id)).rejects.toThrow(/the last registrar stays one/);
  });

  test('does not count one who is suspended', async () => {
    const one = await addRegistrar();
    await leaveOne(one.id);
    const other = await addRegistrar();
    const suspension = { suspendedAt: '2026-02-01T00:00:00Z', suspensionReason: 'For a test', suspendedById: one.id };
    await Member.query(people.knex).findById(other.id).patch(suspension);
    await expect(Member.query(people.knex).findById(one.id).patch({ role: 'member' })).rejects.toThrow(/the last registrar stays one/);
  });

  test('cannot close their account, and everybody else can', async () => {
    const registrar = await addRegistrar();
    await leaveOne(registrar.id);
    const browser = await people.signedIn(registrar);
    expect((await browser.post('/api/me/close').send({ password: PASSWORD }).expect(409)).body).toMatchObject({ type: '/problems/conflict' });
    await browser.get('/api/me/sessions').expect(200);
    await addRegistrar();
    await browser.post('/api/me/close').send({ password: PASSWORD }).expect(200);
  });

  test('is one of two who are demoted at the same moment, thirty times over', async () => {
    for (let round = 0; round < 30; round += 1) {
      const pair = [await addRegistrar(), await addRegistrar()];
      await Member.query(people.knex).whereNotIn('id', pair.map(({ id }) => id)).where({ role: 'registrar' }).patch({ role: 'member' });
      const outcomes = await Promise.allSettled(
        pair.map(({ id }) => withTransaction(people.knex, async (trx) => Member.query(trx).findById(id).patch({ role: 'member' }))),
      );
      expect(outcomes.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
      expect(await Member.query(people.knex).where({ role: 'registrar' }).resultSize()).toBe(1);
    }
  }, 60_000);
});

describe('making a registrar', () => {
  test('makes one of a member, ends their sessions, tells them and writes it down', async () => {
    const member = await people.addMember({ role: 'moderator' });
    const browser = await people.signedIn(member);
    expect(await makeRegistrar(member.email.toUpperCase(), people.knex)).toBe('made');
    await browser.get('/api/me/sessions').expect(401);
    expect(await Member.query(people.knex).findById(member.id)).toMatchObject({ role: 'registrar', scope: 'none', version: 2 });
    expect(await people.lettersTo(member.email)).toMatchObject([{ template: 'role-changed' }]);
    expect((await people.actsOf(member.id)).at(-1)).toMatchObject({
      act: 'role.changed',
      actorId: null,
      detail: { from: 'moderator', to: 'registrar', by: 'command' },
    });
    expect(await makeRegistrar(member.email, people.knex)).toBe('already');
  });

  test('is refused of nobody, of an address never confirmed, of somebody suspended', async () => {
    const registrar = await addRegistrar();
    const suspended = await people.addMember();
    const suspension = { suspendedAt: '2026-02-01T00:00:00Z', suspensionReason: 'For a test', suspendedById: registrar.id };
    await Member.query(people.knex).findById(suspended.id).patch(suspension);
    const unconfirmed = await people.addMember({ verified: false });
    expect(await makeRegistrar('nobody-at-all@bench.example', people.knex)).toBe('unknown');
    expect(await makeRegistrar(unconfirmed.email, people.knex)).toBe('not-verified');
    expect(await makeRegistrar(suspended.email, people.knex)).toBe('suspended');
    expect((await Member.query(people.knex).findById(suspended.id))?.role).toBe('member');
  });
});

describe('npm run registrar', () => {
  const command = (args: readonly string[], settings: Readonly<Record<string, string>> = { DATABASE_URL: people.url }) =>
    runScript('server/main-registrar.ts', args, settings);

  test('makes a member one', async () => {
    const member = await people.addMember();
    const { stdout } = await command([member.email]);
    expect(stdout).toBe(`${member.email} is a registrar now. They sign in anew, and add a second factor before they can act.\n`);
    expect((await Member.query(people.knex).findById(member.id))?.role).toBe('registrar');
  });

  test('says why not, and fails', async () => {
    await expect(command(['nobody-here@bench.example'])).rejects.toMatchObject({ code: 1, stderr: expect.stringContaining('no member') as string });
    await expect(command([])).rejects.toMatchObject({ code: 2, stderr: expect.stringContaining('Say whose') as string });
    await expect(command(['a@b.example'], {})).rejects.toMatchObject({ code: 2, stderr: expect.stringContaining('DATABASE_URL') as string });
  });
});
