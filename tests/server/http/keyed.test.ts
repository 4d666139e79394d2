import { v7 as uuidV7 } from 'uuid';
import { describe, expect, test } from 'vitest';
import { AuditRow } from '#db/models/audit-row.ts';
import { Contribution } from '#db/models/contribution.ts';
import { IdempotencyKey } from '#db/models/idempotency-key.ts';
import { forgetOldKeys } from '#server/services/only-once.ts';
import { someone } from '#tests/support/contributing.ts';
import type { SomeoneSignedIn } from '#tests/support/contributing.ts';
import { usePeople } from '#tests/support/people.ts';
import { pathsOf, problemOf } from '#tests/support/problem.ts';

const people = usePeople();
const DRAFT = { kind: 'part-type', payload: { name: 'Idler bracket', note: null, caution: null } };

function begin({ browser }: SomeoneSignedIn, key: string, body: object = DRAFT) {
  return browser.post('/api/contributions').set('Idempotency-Key', key).send(body);
}

function draftsOf({ id }: SomeoneSignedIn) {
  return Contribution.query(people.knex).where({ authorId: id });
}

// draft-ietf-httpapi-idempotency-key-header-07; the codes as reliability-and-security C5 and C6 have them.
describe('a request with an Idempotency-Key', () => {
  test('sent again is answered as before, and nothing is made twice', async () => {
    const author = await someone(people);
    const key = uuidV7();
    const first = await begin(author, key).expect(201);
    const again = await begin(author, key).expect(201);
    expect(again.body).toEqual(first.body);
    expect(await draftsOf(author)).toHaveLength(1);
    expect(await AuditRow.query(people.knex).where({ actorId: author.id, act: 'contribution.started' })).toHaveLength(1);
  });

  test('sent by twenty at once makes one; each is answered, or told that it is done', async () => {
    const author = await someone(people);
    const key = uuidV7();
    const answers = await Promise.all(Array.from({ length: 20 }, () => begin(author, key)));
    expect(answers.map(({ status }) => status).filter((status) => status !== 201 && status !== 409)).toEqual([]);
    expect(new Set(answers.filter(({ status }) => status === 201).map(({ text }) => text)).size).toBe(1);
    expect(await draftsOf(author)).toHaveLength(1);
  });

  test('with another body is refused, and so is a key that is none', async () => {
    const author = await someone(people);
    const key = uuidV7();
    await begin(author, key).expect(201);
    expect(pathsOf(await problemOf(begin(author, key, { ...DRAFT, note: 'Another' }), 422))).toEqual(['Idempotency-Key']);
    await problemOf(begin(author, 'again please'), 400);
    expect(await draftsOf(author)).toHaveLength(1);
  });

  test('that failed leaves the key free', async () => {
    const author = await someone(people);
    const key = uuidV7();
    await problemOf(begin(author, key, { ...DRAFT, subjectId: uuidV7() }), 422);
    await begin(author, key).expect(201);
  });

  test('is another member’s own: the same key makes their own', async () => {
    const [author, other] = [await someone(people), await someone(people)];
    const key = uuidV7();
    const first = await begin(author, key).expect(201);
    const theirs = await begin(other, key).expect(201);
    expect(theirs.body).not.toEqual(first.body);
  });

  test('whose answer was lost is told that it was done', async () => {
    const author = await someone(people);
    const key = uuidV7();
    await begin(author, key).expect(201);
    await IdempotencyKey.query(people.knex).findById([author.id, key]).patch({ answer: null });
    await problemOf(begin(author, key), 409);
    expect(await draftsOf(author)).toHaveLength(1);
  });

  test('is forgotten after two days, and not before', async () => {
    const author = await someone(people);
    const [old, young] = [uuidV7(), uuidV7()];
    await begin(author, old).expect(201);
    await begin(author, young).expect(201);
    await people.knex('idempotency_keys').where({ key: old }).update({ at: people.knex.raw(`now() - interval '49 hours'`) });
    await people.knex('idempotency_keys').where({ key: young }).update({ at: people.knex.raw(`now() - interval '47 hours'`) });
    await forgetOldKeys(people.knex);
    expect((await IdempotencyKey.query(people.knex).where({ memberId: author.id })).map(({ key }) => key)).toEqual([young]);
  });
});
