import { v7 as uuidV7 } from 'uuid';
import { describe, expect, test } from 'vitest';
import { Maker } from '#db/models/maker.ts';
import { ATTEMPT_KINDS, LINK_PURPOSES, MEMBER_SCOPES, SESSION_STAGES, SIGN_IN_STRENGTHS } from '#db/vocabulary.ts';
import { MEMBER_ROLES } from '#domain/vocabulary.ts';
import { usePeople } from '#tests/support/people.ts';

const people = usePeople();
const HASH = 'a'.repeat(64);
const THEN = '2026-01-01T00:00:00Z';

function anId(): string {
  return uuidV7();
}

function aHash(): string {
  return Buffer.from(uuidV7() + uuidV7()).toString('hex').slice(0, 64);
}

describe('a member can never be', () => {
  test.each([
    ['with an address and no password', { passwordHash: null }],
    ['with a password and no address', { email: null, emailVerifiedAt: null }],
    ['confirmed without an address', { email: null, passwordHash: null }],
    ['with a password that is not hashed', { passwordHash: 'four gear cases on a bench' }],
    ['with an address that is two', { email: 'a@b.example c@d.example' }],
    ['with an address without end', { email: `${'a'.repeat(250)}@b.example` }],
    ['of a role nobody knows', { role: 'owner' }],
    ['a registrar whose address nobody confirmed', { role: 'registrar', emailVerifiedAt: null }],
    ['a moderator without a scope', { role: 'moderator' }],
    ['a member with a scope', { scope: 'all' }],
    ['a registrar with a scope', { role: 'registrar', scope: 'some' }],
    ['suspended without a reason', { suspendedAt: THEN }],
    ['suspended by nobody', { suspendedAt: THEN, suspensionReason: 'For a test' }],
    ['closed with an address', { closedAt: THEN }],
    ['closed with a name', { closedAt: THEN, email: null, emailVerifiedAt: null, passwordHash: null }],
    ['of version nought', { version: 0 }],
    ['confirmed at no time', { emailVerifiedAt: 'infinity' }],
  ])('%s', async (_state, wrong) => {
    const member = await people.addMember();
    await expect(people.knex('members').where({ id: member.id }).update(wrong)).rejects.toMatchObject({ code: '23514' });
  });

  test('suspended by themselves', async () => {
    const { id } = await people.addMember();
    const suspension = { suspendedAt: THEN, suspensionReason: 'For a test', suspendedById: id };
    await expect(people.knex('members').where({ id }).update(suspension)).rejects.toMatchObject({ code: '23514' });
  });

  test('of the same address as another, in whatever case', async () => {
    const { email } = await people.addMember();
    const other = await people.addMember();
    await expect(people.knex('members').where({ id: other.id }).update({ email: email.toUpperCase() })).rejects.toMatchObject({ code: '23505' });
  });
});

describe('a scope', () => {
  test('is that of a moderator of some makers, and keeps them one', async () => {
    const { knex } = people;
    const { id: makerId } = await Maker.query(knex).first().throwIfNotFound();
    const member = await people.addMember();
    const all = await people.addMember({ role: 'moderator' });
    for (const { id } of [member, all]) {
      await expect(knex('member_scopes').insert({ memberId: id, makerId })).rejects.toMatchObject({ code: '23503' });
    }
    await knex('members').where({ id: all.id }).update({ scope: 'some' });
    await knex('member_scopes').insert({ memberId: all.id, makerId });
    for (const change of [{ scope: 'all' }, { role: 'member', scope: 'none' }]) {
      await expect(knex('members').where({ id: all.id }).update(change)).rejects.toMatchObject({ code: '23503' });
    }
  });
});

describe('a session can never be', () => {
  test.each([
    ['under its secret itself', { id: 'A'.repeat(43) }],
    ['at a stage nobody knows', { stage: 'half' }],
    ['owed after a second factor', { stage: 'owed', strength: 'second-factor' }],
    ['seen before it began', { lastSeenAt: THEN }],
    ['proved before it began', { confirmedAt: THEN }],
    ['on a device without a name', { device: '' }],
  ])('%s', async (_state, wrong) => {
    const { id: memberId } = await people.addMember();
    const row = { id: aHash(), publicId: anId(), memberId, stage: 'open', strength: 'password', device: 'A browser' };
    await people.knex('sessions').insert(row);
    await expect(people.knex('sessions').insert({ ...row, id: aHash(), publicId: anId(), ...wrong })).rejects.toMatchObject({ code: '23514' });
  });
});

describe('a link can never be', () => {
  test.each([
    ['for something else', { purpose: 'sign-in' }, '23514'],
    ['to change to no address', { purpose: 'change-email' }, '23514'],
    ['to confirm another address', { email: 'a@b.example' }, '23514'],
    ['kept as it was sent', { hash: 'A'.repeat(43) }, '23514'],
    ['good for ever', { expiresAt: 'infinity' }, '23514'],
    ['one of two of a purpose', { purpose: 'reset' }, '23505'],
  ])('%s', async (_state, wrong, code) => {
    const { id: memberId } = await people.addMember();
    await people.knex('link_tokens').insert({ hash: aHash(), memberId, purpose: 'reset', expiresAt: THEN });
    const row = { hash: aHash(), memberId, purpose: 'verify', expiresAt: THEN };
    await expect(people.knex('link_tokens').insert({ ...row, ...wrong })).rejects.toMatchObject({ code });
  });
});

describe('a second factor can never be', () => {
  test.each([
    ['an authenticator with a secret too short', 'authenticators', { secret: 'ABC' }],
    ['an authenticator confirmed by no code', 'authenticators', { secret: 'A'.repeat(32), confirmedAt: THEN }],
    ['a recovery code as it is written', 'recovery_codes', { hash: 'ABCD-EFGH' }],
    ['a challenge to add a key to nobody', 'webauthn_challenges', { challenge: 'A'.repeat(43), purpose: 'add', expiresAt: THEN, memberId: null }],
    ['a challenge that is guessed', 'webauthn_challenges', { challenge: 'A', purpose: 'sign-in', expiresAt: THEN }],
    ['a passkey that counts backwards', 'passkeys', { credentialId: 'abc', publicKey: Buffer.from('k'), counter: -1, transports: [], name: 'Key', backedUp: false }],
  ])('%s', async (_state, table, wrong) => {
    const { id: memberId } = await people.addMember();
    const withId = table === 'passkeys' ? { id: anId() } : {};
    await expect(people.knex(table).insert({ memberId, ...withId, ...wrong })).rejects.toMatchObject({ code: '23514' });
  });
});

test('an attempt is counted under a hash and a network, nothing else', async () => {
  const row = { id: anId(), kind: 'password', account: HASH, network: '192.0.2.1/32' };
  await people.knex('attempts').insert(row);
  for (const wrong of [{ account: 'a@b.example' }, { kind: 'guess' }]) {
    await expect(people.knex('attempts').insert({ ...row, id: anId(), ...wrong })).rejects.toMatchObject({ code: '23514' });
  }
  await expect(people.knex('attempts').insert({ ...row, id: anId(), network: '192.0.2.1/24' })).rejects.toMatchObject({ code: '22P02' });
});

describe('the words of a column', () => {
  test.each([
    ['members_role_check', MEMBER_ROLES],
    ['members_scope_check', MEMBER_SCOPES],
    ['sessions_stage_check', SESSION_STAGES],
    ['sessions_strength_check', SIGN_IN_STRENGTHS],
    ['link_tokens_purpose_check', LINK_PURPOSES],
    ['attempts_kind_check', ATTEMPT_KINDS],
  ])('%s are those of the vocabulary', async (constraint, words) => {
    const { rows } = await people.knex.raw<{ rows: { definition: string }[] }>(
      'select pg_get_constraintdef(oid) as definition from pg_constraint where conname = ?',
      [constraint],
    );
    const inDatabase = [...(rows[0]?.definition ?? '').matchAll(/'([^']+)'/g)].map(([, word]) => word);
    expect(inDatabase).toEqual([...words]);
  });
});
