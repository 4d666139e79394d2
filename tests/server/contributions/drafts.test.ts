import { v7 as uuidV7 } from 'uuid';
import { describe, expect, test } from 'vitest';
import { listAudit } from '#contract/admin.ts';
import { ContributionPage } from '#contract/contributions.ts';
import { Account } from '#db/models/account.ts';
import { AuditRow } from '#db/models/audit-row.ts';
import { Contribution } from '#db/models/contribution.ts';
import { FactName } from '#db/models/fact-name.ts';
import { Source } from '#db/models/source.ts';
import { CIPHER_LIMITS } from '#domain/ciphers/definition.ts';
import { decide, factCalled, OWN_KNOWLEDGE, putForward, someone, start } from '#tests/support/contributing.ts';
import type { SomeoneSignedIn } from '#tests/support/contributing.ts';
import { TEST_CIPHER } from '#tests/support/factories/catalogue.ts';
import { usePeople } from '#tests/support/people.ts';
import { pathsOf, problemOf } from '#tests/support/problem.ts';

const people = usePeople();
const NOBODY = '018f0000-0000-7000-8000-000000000000';
const PART_TYPE = { name: 'Idler bracket', note: null, caution: null };

function save({ browser }: SomeoneSignedIn, { id, revision, payload, citations }: ContributionPage, changes: object = {}) {
  return browser.put(`/api/contributions/${id}`).send({ revision, payload, sources: citations, note: null, ...changes });
}

function tryPuttingForward({ browser }: SomeoneSignedIn, { id, revision }: Pick<ContributionPage, 'id' | 'revision'>) {
  return browser.post(`/api/contributions/${id}/put-forward`).send({ revision });
}

async function brackwater(): Promise<string> {
  return factCalled(people, 'maker', 'Brackwater Tractor Works');
}

describe('a draft', () => {
  test('begins as the version says, with its sources, and is written down', async () => {
    const author = await someone(people);
    const casting = await FactName.query(people.knex).findOne({ slug: 'brackwater-b4406' }).throwIfNotFound();
    const draft = await start(author, { kind: 'casting', subjectId: casting.id, baseVersion: 4 });
    expect(draft).toMatchObject({ payload: { number: 'B4406' }, base: { version: 4 }, inForce: { version: 4 }, differences: [], faults: [], revision: 1 });
    expect(draft.payload).not.toHaveProperty('slug');
    expect(draft.sources.length).toBeGreaterThan(0);
    expect(draft.names.map(({ title }) => title)).toContain('Brackwater Tractor Works');
    const [row] = await AuditRow.query(people.knex).where({ subjectId: draft.id });
    expect(row).toMatchObject({ act: 'contribution.started', actorId: author.id, detail: { factId: casting.id, kind: 'casting' } });
  });

  test('is kept half and wrong as it is typed, and what is wrong is told by path', async () => {
    const author = await someone(people);
    const draft = await start(author, { kind: 'serial-range', payload: { numbers: { from: 'x' } }, sources: [{ newSource: { kind: 'book' } }] });
    expect(draft.faults.map(({ path }) => path.join('.'))).toEqual(
      expect.arrayContaining(['payload.seriesId', 'payload.numbers.from', 'payload.numbers.to', 'payload.built', 'citations.0.newSource.title']),
    );
    const half = ContributionPage.parse((await save(author, draft, { payload: { seriesId: 'not an id', note: ['wrong'] }, sources: [], note: ' A thought ' }).expect(200)).body);
    expect(half).toMatchObject({ payload: { seriesId: 'not an id', note: ['wrong'] }, citations: [], note: 'A thought', revision: 2, title: 'A new serial range' });
    expect(ContributionPage.parse((await author.browser.get(`/api/contributions/${draft.id}`).expect(200)).body)).toEqual(half);
  });

  test('saved twice at once is kept once, and the other is told', async () => {
    const author = await someone(people);
    const draft = await start(author, { kind: 'part-type', payload: PART_TYPE });
    const both = await Promise.all([save(author, draft, { note: 'One' }), save(author, draft, { note: 'Two' })]);
    expect(both.map(({ status }) => status).toSorted()).toEqual([200, 409]);
    await problemOf(save(author, draft), 409);
  });

  test('can be thrown away until it is put forward', async () => {
    const author = await someone(people);
    const draft = await start(author, { kind: 'part-type', payload: PART_TYPE });
    await author.browser.delete(`/api/contributions/${draft.id}`).expect(200, { done: true });
    await problemOf(author.browser.get(`/api/contributions/${draft.id}`), 404);
    const put = await putForward(author, await start(author, { kind: 'part-type', payload: PART_TYPE }));
    await problemOf(author.browser.delete(`/api/contributions/${put.id}`), 409);
    await problemOf(save(author, put), 409);
  });

  test('is one of a hundred at most', async () => {
    const author = await someone(people);
    const rows = Array.from({ length: 100 }, () => ({ id: uuidV7(), authorId: author.id, kind: 'casting', title: 'B1', state: 'drafted', payload: {}, citations: [] }) as const);
    await Contribution.query(people.knex).insert(rows);
    await problemOf(author.browser.post('/api/contributions').send({ kind: 'casting' }), 409);
    await author.browser.delete(`/api/contributions/${rows[0]?.id}`).expect(200);
    await start(author, { kind: 'casting', payload: {} });
  });

  test('is its author’s alone', async () => {
    const author = await someone(people);
    const draft = await start(author, { kind: 'part-type', payload: PART_TYPE });
    const others = [await someone(people), await someone(people, { role: 'moderator' }), await someone(people, { role: 'registrar' }), { browser: people.browser() }];
    for (const { browser } of others) {
      await problemOf(browser.get(`/api/contributions/${draft.id}`), 404);
      await problemOf(browser.get(`/api/contributions/${draft.id}/evidence`), 404);
    }
    const [other] = others;
    await problemOf(other!.browser.put(`/api/contributions/${draft.id}`).send({ revision: 1, payload: {}, sources: [], note: null }), 404);
    await problemOf(other!.browser.delete(`/api/contributions/${draft.id}`), 404);
    await problemOf(other!.browser.post(`/api/contributions/${draft.id}/put-forward`).send({ revision: 1 }), 404);
    await problemOf(other!.browser.post(`/api/contributions/${draft.id}/comments`).send({ path: null, text: 'Hello' }), 404);
    await problemOf(author.browser.post(`/api/contributions/${draft.id}/comments`).send({ path: null, text: 'Hello' }), 409);
    await problemOf(author.browser.get(`/api/contributions/${draft.id}/evidence`), 403);
  });

  test.each<[string, object, number, readonly string[]]>([
    ['of no kind', { kind: 'spanner' }, 422, ['kind']],
    ['of a fact there is none of', { kind: 'casting', subjectId: NOBODY }, 422, ['subjectId']],
    ['on a version without a fact', { kind: 'casting', baseVersion: 1 }, 422, ['baseVersion']],
    ['with a payload that is no object', { kind: 'casting', payload: [] }, 422, ['payload']],
    ['with more sources than a fact can have', { kind: 'casting', sources: Array.from({ length: 41 }, () => ({})) }, 422, ['sources']],
    ['with something nobody asks for', { kind: 'casting', state: 'entered' }, 422, ['state']],
  ])('is not begun %s', async (_what, body, status, paths) => {
    const { browser } = await someone(people);
    expect(pathsOf(await problemOf(browser.post('/api/contributions').send(body), status))).toEqual(paths);
  });

  test('is begun by members, on a version of that kind that is in force', async () => {
    await problemOf(people.browser().post('/api/contributions').send({ kind: 'casting' }), 401);
    const { browser } = await someone(people);
    const { id } = await FactName.query(people.knex).findOne({ slug: 'brackwater-b4406' }).throwIfNotFound();
    expect(pathsOf(await problemOf(browser.post('/api/contributions').send({ kind: 'maker', subjectId: id }), 422))).toEqual(['subjectId']);
    expect(pathsOf(await problemOf(browser.post('/api/contributions').send({ kind: 'casting', subjectId: id, baseVersion: 9 }), 422))).toEqual(['baseVersion']);
    await problemOf(browser.post('/api/contributions').send({ kind: 'casting', subjectId: id, baseVersion: 3 }), 409);
    await problemOf(browser.post('/api/contributions').set('Content-Type', 'application/json').send('{"kind":'), 400);
    await problemOf(browser.get('/api/contributions/1'), 422);
    await problemOf(browser.get(`/api/contributions/${NOBODY}`), 404);
  });

  test('is named in the trail once it was put forward, and not before', async () => {
    const [author, registrar] = [await someone(people), await someone(people, { role: 'registrar' })];
    const draft = await start(author, { kind: 'part-type', payload: { ...PART_TYPE, name: 'Trail peg' } });
    const nameInTrail = async (): Promise<readonly (string | undefined)[]> => {
      const answer = await registrar.browser.get(`/api/admin/audit?subject=${draft.id}`).expect(200);
      return listAudit.answer.parse(answer.body).items.map(({ subject }) => subject?.name);
    };
    expect(await nameInTrail()).toEqual([draft.id]);
    await putForward(author, draft);
    expect(await nameInTrail()).toEqual(['Trail peg', 'Trail peg']);
  });

  test('of a member who closes the account goes with it; what was put forward stays', async () => {
    const author = await someone(people);
    const draft = await start(author, { kind: 'part-type', payload: PART_TYPE });
    const put = await putForward(author, await start(author, { kind: 'part-type', payload: { ...PART_TYPE, name: 'Idler pin' } }));
    const mine = await author.browser.get('/api/me/export').expect(200);
    expect(mine.body).toMatchObject({ contributions: [{ contribution: draft.id, state: 'drafted' }, { contribution: put.id, state: 'put-forward' }] });
    await author.browser.post('/api/me/close').send({ password: 'rivet, boss and draft angle' }).expect(200);
    expect(await Contribution.query(people.knex).where({ authorId: author.id })).toMatchObject([{ id: put.id }]);
  });
});

describe('putting forward', () => {
  test('tells every fault of payload and sources by path', async () => {
    const author = await someone(people);
    const draft = await start(author, {
      kind: 'wear-limit',
      payload: { partTypeId: NOBODY, measure: '', unit: 'stone', direction: 'most', limit: 'far', note: null, extra: 1 },
      sources: [{ sourceId: null, newSource: { kind: 'book', title: 'A book', author: null, publisher: null, year: null, note: null }, field: 'Not A Field', locator: null, note: null }],
    });
    const problem = await problemOf(tryPuttingForward(author, draft), 422);
    expect(pathsOf(problem).toSorted()).toEqual(
      ['payload.asBuilt', 'payload.extra', 'payload.limit', 'payload.measure', 'payload.method', 'payload.modelId', 'payload.unit', 'citations.0.field', 'citations.0.locator'].toSorted(),
    );
    expect(await Contribution.query(people.knex).findById(draft.id)).toMatchObject({ state: 'drafted', revision: 1 });
  });

  test('takes no book without a page, no source twice, and at least one', async () => {
    const author = await someone(people);
    const book = { ...OWN_KNOWLEDGE, newSource: { kind: 'book', title: 'A book', author: null, publisher: null, year: null, note: null } };
    const { id: sourceId } = await Source.query(people.knex).first().throwIfNotFound();
    const cited = { ...OWN_KNOWLEDGE, sourceId, newSource: null };
    for (const [sources, path] of [
      [[], 'citations'],
      [[book], 'citations.0.locator'],
      [[{ ...OWN_KNOWLEDGE, newSource: null }], 'citations.0.sourceId'],
      [[{ ...cited, sourceId: NOBODY }], 'citations.0.sourceId'],
      [[cited, cited], 'citations'],
    ] as const) {
      const draft = await start(author, { kind: 'part-type', payload: PART_TYPE, sources });
      expect(pathsOf(await problemOf(tryPuttingForward(author, draft), 422)), path).toEqual([path]);
    }
  });

  test('asks the rest of the catalogue: what is referred to is there and of its kind, and no rule of it is broken', async () => {
    const author = await someone(people);
    const makerId = await brackwater();
    const { id: modelId, partTypeId } = await FactName.query(people.knex).findOne({ kind: 'position', title: '30 Crawler, Cylinder block' }).throwIfNotFound();
    const crawler = await factCalled(people, 'model', '30 Crawler');
    const gearCase = await factCalled(people, 'part-type', 'Gear case');
    const block = await FactName.query(people.knex).findOne({ slug: 'brackwater-b4406' }).throwIfNotFound();
    const later = await FactName.query(people.knex).findOne({ slug: 'brackwater-b5120' }).throwIfNotFound();
    const lead = { modelId: crawler, partTypeId, name: 'Under the seat', ordinal: 77, weight: 1, lead: { from: 0, to: 9 }, note: null };
    const range = { accountId: null, built: { from: '1950-01-01', to: '1950-12-31' }, precision: 'year', meaning: 'built', standing: 'solid', inOrder: true, note: null };
    const seriesId = await factCalled(people, 'series', '30 Crawler 3C');
    const book = await Account.query(people.knex).findOne({ slug: 'brackwater-parts-book-14' }).throwIfNotFound();
    for (const [kind, payload, path] of [
      ['works', { makerId: modelId, name: 'Yard', place: null, note: null }, 'payload.makerId'],
      ['works', { makerId: NOBODY, name: 'Yard', place: null, note: null }, 'payload.makerId'],
      ['maker', { name: 'Brackwater Tractor Works', place: null, buildsMachines: true, poursIron: false, foundryMark: null, founded: null, closed: null, note: null }, 'payload.name'],
      ['part-type', { ...PART_TYPE, name: 'Gear case' }, 'payload.name'],
      ['position', lead, 'payload.lead'],
      ['position', { ...lead, lead: null, ordinal: 1 }, 'payload.ordinal'],
      ['casting', { makerId, pouredById: makerId, partTypeId: gearCase, number: 'B1', pattern: null, made: null, note: null, tells: [], partNumbers: [{ number: '1-1', note: null }, { number: '11', note: null }] }, 'payload.partNumbers'],
      ['supersession', { oldId: later.id, newId: block.id, interchange: 'both-ways', note: null }, 'payload.newId'],
      ['serial-range', { ...range, seriesId, accountId: book.id, numbers: { from: '1200', to: '1300' } }, 'payload.numbers'],
      ['serial-range', { ...range, seriesId, accountId: NOBODY, numbers: { from: '1200', to: '1300' } }, 'payload.accountId'],
    ] as const) {
      const draft = await start(author, { kind, payload });
      expect(draft.faults.map((fault) => fault.path.join('.')), `${kind} ${path}`).toEqual([path]);
      expect(pathsOf(await problemOf(tryPuttingForward(author, draft), 422)), `${kind} ${path}`).toEqual([path]);
    }
  });

  test('refuses a cipher that would take more than the decoder’s limits, naming the limit', async () => {
    const author = await someone(people);
    const payload = { makerId: await brackwater(), foundryId: null, title: 'Too long', machineKind: null, note: null };
    const symbols = Object.fromEntries(Array.from({ length: CIPHER_LIMITS.symbolsPerSet + 1 }, (_, place) => [`M${place}`, (place % 12) + 1]));
    const draft = await start(author, {
      kind: 'cipher',
      payload: { ...payload, definition: { ...TEST_CIPHER, symbolSets: { months: { kind: 'values', symbols } } } },
    });
    const problem = await problemOf(tryPuttingForward(author, draft), 422);
    expect(pathsOf(problem)[0]).toMatch(/^payload\.definition/);
    expect(problem.errors?.map(({ message }) => message).join(' ')).toContain(String(CIPHER_LIMITS.symbolsPerSet));
    const exceptions = Array.from({ length: CIPHER_LIMITS.exceptions + 1 }, () => ({ fields: { year: '30' }, from: '1931-01-01', to: '1931-02-01' }));
    const many = await start(author, { kind: 'cipher', payload: { ...payload, definition: { ...TEST_CIPHER, exceptions } } });
    expect(pathsOf(await problemOf(tryPuttingForward(author, many), 422))).toContain('payload.definition.exceptions');
  });

  test('keeps HTML for the text it is', async () => {
    const [author, moderator] = [await someone(people), await someone(people, { role: 'moderator' })];
    const name = '<img src=x onerror=alert(1)>&amp;<b>Idler</b>';
    const draft = await start(author, { kind: 'part-type', payload: { name, note: '<script>1</script>', caution: null }, note: '</textarea><i>' });
    const put = await putForward(author, draft);
    const answer = await decide(moderator, put, 'send-back', '<u>No</u>').expect(200);
    expect(answer.headers['content-type']).toContain('application/json');
    expect(answer.body).toMatchObject({ title: name, payload: { name, note: '<script>1</script>' }, note: '</textarea><i>', decisions: [{ reason: '<u>No</u>' }] });
  });

  test('refuses a note of 5 MB before it is read', async () => {
    const author = await someone(people);
    const draft = await start(author, { kind: 'part-type', payload: PART_TYPE });
    const note = 'n'.repeat(5 * 1024 * 1024);
    await problemOf(save(author, draft, { note }), 413);
    expect(pathsOf(await problemOf(save(author, draft, { note: 'n'.repeat(4001) }), 422))).toEqual(['note']);
    expect(await Contribution.query(people.knex).findById(draft.id)).toMatchObject({ revision: 1, note: null });
  });

  test('is done once, by the author, of what they last saw', async () => {
    const author = await someone(people);
    const draft = await start(author, { kind: 'part-type', payload: { ...PART_TYPE, name: 'Idler pin' } });
    await save(author, draft).expect(200);
    await problemOf(tryPuttingForward(author, draft), 409);
    const both = await Promise.all([tryPuttingForward(author, { ...draft, revision: 2 }), tryPuttingForward(author, { ...draft, revision: 2 })]);
    expect(both.map(({ status }) => status).toSorted()).toEqual([200, 409]);
    await problemOf(people.browser().post(`/api/contributions/${draft.id}/put-forward`).send({ revision: 3 }), 401);
    await problemOf(tryPuttingForward(await someone(people, { role: 'moderator' }), { ...draft, revision: 3 }), 403);
  });
});
