import type supertest from 'supertest';
import { describe, expect, test } from 'vitest';
import type { z } from 'zod';
import { tryCipher } from '#contract/cipher-workbench.ts';
import { listReworks } from '#contract/moderation.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { CipherVersion } from '#db/models/cipher-version.ts';
import { Cipher } from '#db/models/cipher.ts';
import { usePeople } from '#tests/support/people.ts';
import { problemOf } from '#tests/support/problem.ts';
import { signedInFully } from '#tests/support/second-factors.ts';

const people = usePeople();

async function tenLetter(): Promise<{ readonly cipher: Cipher; readonly definition: CipherDefinition }> {
  const cipher = await Cipher.query(people.knex).findOne({ slug: 'brackwater-ten-letter' }).throwIfNotFound();
  const { definition } = await CipherVersion.query(people.knex).modify('inForce').findOne({ cipherId: cipher.id }).throwIfNotFound();
  return { cipher, definition };
}

function tryIt(browser: supertest.Agent, body: object): supertest.Test {
  return browser.post('/api/ciphers/try').send(body);
}

async function tried(browser: supertest.Agent, body: object): Promise<z.output<(typeof tryCipher)['answer']>> {
  return tryCipher.answer.parse((await tryIt(browser, body).expect(200)).body);
}

describe('trying a draft cipher', () => {
  test('counts how it reads every date mark of its maker, and what the version in force reads otherwise', async () => {
    const member = await people.signedIn(await people.addMember());
    const { cipher, definition } = await tenLetter();
    const { makerId, foundryId } = cipher;
    const body = { makerId, foundryId, definition, subjectId: cipher.id };
    const same = await tried(member, body);
    expect(same).toMatchObject({ changed: 0, inForce: same.draft });
    expect(same.marks).toBe(same.draft.decoded + same.draft.ambiguous + same.draft.impossible);
    expect(same.draft.decoded).toBeGreaterThan(50);
    expect(same.unlisted).toBeGreaterThan(0);

    const shorter = await tried(member, { ...body, definition: { ...definition, usedTo: '1939-12-31' } });
    expect(shorter.inForce).toEqual(same.draft);
    expect(shorter.changed).toBeGreaterThan(0);
    expect(shorter.draft.decoded + shorter.draft.ambiguous).toBeLessThan(same.draft.decoded + same.draft.ambiguous);
    const [first] = shorter.rows;
    expect(first?.item.subject).toMatchObject({ kind: 'mark' });
    expect(first?.draft).not.toEqual(first?.inForce);

    const fresh = await tried(member, { ...body, subjectId: null });
    expect(fresh).toMatchObject({ draft: same.draft, inForce: null, changed: 0 });
    expect(fresh.rows.length).toBeGreaterThan(0);
    expect(fresh.rows.every((row) => row.inForce === null)).toBe(true);
  });

  test('is for members, of a maker on record, with a definition that can be used', async () => {
    const { cipher, definition } = await tenLetter();
    const body = { makerId: cipher.makerId, foundryId: null, definition, subjectId: null };
    await problemOf(tryIt(people.browser(), body), 401);
    const member = await people.signedIn(await people.addMember());
    const unknown = await problemOf(tryIt(member, { ...body, makerId: cipher.id }), 422);
    expect(unknown.errors).toMatchObject([{ path: ['makerId'] }]);
    const broken = await problemOf(tryIt(member, { ...body, definition: { ...definition, symbolSets: {} } }), 422);
    expect(broken.errors?.[0]?.path.slice(0, 2)).toEqual(['definition', 'fields']);
  });
});

describe('the list of reworks', () => {
  const listed = async (browser: supertest.Agent, query = '') =>
    listReworks.answer.parse((await browser.get(`/api/moderation/reworks${query}`).expect(200)).body);

  test('is for moderators and registrars, the newest first', async () => {
    await problemOf(people.browser().get('/api/moderation/reworks'), 401);
    const member = await people.signedIn(await people.addMember());
    await problemOf(member.get('/api/moderation/reworks'), 404);
    const owing = await people.signedIn(await people.addMember({ role: 'moderator' }));
    await problemOf(owing.get('/api/moderation/reworks'), 403);

    for (const role of ['moderator', 'registrar'] as const) {
      const browser = await signedInFully(people, await people.addMember({ role, authenticator: true }));
      const { items, total } = await listed(browser, '?limit=2');
      expect(total).toBe(4);
      expect(items).toHaveLength(2);
      expect(items[0]).toMatchObject({ state: 'waiting', done: 0, total: null, changed: 0, machinesChanged: 0, fact: { kind: 'maker' } });
      expect((await listed(browser, '?q=skerry')).items.map(({ fact }) => fact.title)).toEqual(['Skerry Foundry']);
    }
  });
});
