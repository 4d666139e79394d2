import { beforeEach, describe, expect, test } from 'vitest';
import { FactHistory } from '#contract/facts.ts';
import { Anchor } from '#db/models/anchor.ts';
import { AuditRow } from '#db/models/audit-row.ts';
import { FactName } from '#db/models/fact-name.ts';
import { Flag } from '#db/models/flag.ts';
import { Notice } from '#db/models/notice.ts';
import { Rework } from '#db/models/rework.ts';
import { SeriesAccount } from '#db/models/series-account.ts';
import { entered, factCalled, historyOf, OWN_KNOWLEDGE, someone } from '#tests/support/contributing.ts';
import type { SomeoneSignedIn } from '#tests/support/contributing.ts';
import { usePeople } from '#tests/support/people.ts';
import { pathsOf, problemOf } from '#tests/support/problem.ts';

const people = usePeople();
const NOBODY = '018f0000-0000-7000-8000-000000000000';

let author: SomeoneSignedIn;
let moderator: SomeoneSignedIn;
let names = 0;

beforeEach(async () => {
  author = await someone(people);
  moderator = await someone(people, { role: 'moderator' });
});

async function worksEntered(by: SomeoneSignedIn = author): Promise<string> {
  names += 1;
  const makerId = await factCalled(people, 'maker', 'Brackwater Tractor Works');
  return entered(by, moderator, { kind: 'works', payload: { makerId, name: `Shed ${names}`, place: null, note: null } });
}

async function change(factId: string, by: SomeoneSignedIn, note: string): Promise<void> {
  const { payload } = (await historyOf(by, factId)).steps[0] ?? { payload: {} };
  await entered(by, moderator, { kind: 'works', subjectId: factId, payload: { ...payload, note }, sources: [OWN_KNOWLEDGE] });
}

describe('the history of a fact', () => {
  test('is everybody’s to read, with what each version changed and what the viewer may do', async () => {
    const id = await factCalled(people, 'casting', 'B4406 (first pattern)');
    const history = await historyOf({ browser: people.browser() }, id);
    expect(history).toMatchObject({ fact: { slug: 'brackwater-b4406' }, inForce: 4, can: { edit: false, bringBack: false, retire: false, flag: false } });
    expect(history.steps.map(({ version }) => version)).toEqual([4, 3, 2, 1]);
    expect(history.steps[0]?.differences).toEqual([expect.objectContaining({ label: 'Tells, 2', before: null })]);
    expect(history.steps.at(-1)?.differences.every(({ before }) => before === null)).toBe(true);
    expect(history.steps[0]).toMatchObject({ by: { displayName: 'Harrow Lane' }, decidedBy: { displayName: 'Ottoline Marsh' } });
    expect((await historyOf(author, id)).can).toEqual({ edit: true, bringBack: false, retire: false, flag: true });
    expect((await historyOf(moderator, id)).can).toEqual({ edit: true, bringBack: true, retire: true, flag: true });
    await problemOf(people.browser().get(`/api/facts/${NOBODY}/history`), 404);
    await problemOf(people.browser().get('/api/facts/b4406/history'), 422);
  });
});

describe('bringing a version back', () => {
  const bringBack = ({ browser }: Pick<SomeoneSignedIn, 'browser'>, id: string, body: object) => browser.post(`/api/facts/${id}/bring-back`).send({ reason: 'The first was right', ...body });

  test('makes a new one under its giver’s name, and tells both givers', async () => {
    const other = await someone(people);
    const id = await worksEntered();
    await change(id, other, 'Moved in 1921.');
    const history = FactHistory.parse((await bringBack(moderator, id, { version: 1, inForce: 2 }).expect(200)).body);
    expect(history.steps[0]).toMatchObject({ version: 3, broughtBack: 1, by: { id: author.id }, decidedBy: { id: moderator.id }, contributionId: null, reason: 'The first was right' });
    const href = `/facts/${id}/history`;
    expect(await Notice.query(people.knex).where({ memberId: author.id, href })).toMatchObject([{ title: `Brought back: ${history.fact.title}` }]);
    expect(await Notice.query(people.knex).where({ memberId: other.id, href })).toHaveLength(1);
    const [row] = await AuditRow.query(people.knex).where({ act: 'fact.brought-back', subjectId: id });
    expect(row).toMatchObject({ subjectKind: 'works', detail: { factId: id, kind: 'works', version: 3, broughtBack: 1 } });
  });

  test('is for moderators of its maker, of what they did not give, and of the history they saw', async () => {
    const id = await worksEntered();
    await change(id, await someone(people), 'Burnt.');
    await problemOf(bringBack({ browser: people.browser() }, id, { version: 1, inForce: 2 }), 401);
    await problemOf(bringBack(author, id, { version: 1, inForce: 2 }), 403);
    await problemOf(bringBack(await someone(people, { role: 'registrar' }), id, { version: 1, inForce: 2 }), 403);
    await problemOf(bringBack(await someone(people, { role: 'moderator', moderates: ['skerry-foundry'] }), id, { version: 1, inForce: 2 }), 403);
    const owed = await someone(people, { role: 'moderator', strength: 'password' });
    expect((await problemOf(bringBack(owed, id, { version: 1, inForce: 2 }), 403)).type).toBe('/problems/second-factor-owed');
    expect((await problemOf(bringBack(moderator, id, { version: 1, inForce: 1 }), 409)).detail).toContain('version 2 is in force');
    await problemOf(bringBack(moderator, id, { version: 2, inForce: 2 }), 409);
    expect(pathsOf(await problemOf(bringBack(moderator, id, { version: 9, inForce: 2 }), 422))).toEqual(['version']);
    expect(pathsOf(await problemOf(bringBack(moderator, id, { version: 1 }), 422))).toEqual(['inForce']);
    await problemOf(bringBack(moderator, NOBODY, { version: 1, inForce: 2 }), 404);
    const both = await Promise.all([bringBack(moderator, id, { version: 1, inForce: 2 }), bringBack(await someone(people, { role: 'moderator' }), id, { version: 1, inForce: 2 })]);
    expect(both.map(({ status }) => status).toSorted()).toEqual([200, 409]);
  });

  test('of one’s own is another’s to do', async () => {
    const second = await someone(people, { role: 'moderator' });
    names += 1;
    const makerId = await factCalled(people, 'maker', 'Brackwater Tractor Works');
    const id = await entered(moderator, second, { kind: 'works', payload: { makerId, name: `Shed ${names}`, place: null, note: null } });
    await entered(author, second, { kind: 'works', subjectId: id, payload: { makerId, name: `Shed ${names}`, place: 'Ardle', note: null }, sources: [OWN_KNOWLEDGE] });
    await problemOf(bringBack(moderator, id, { version: 1, inForce: 2 }), 403);
    await bringBack(second, id, { version: 1, inForce: 2 }).expect(200);
    await problemOf(moderator.browser.post(`/api/facts/${id}/retire`).send({ reason: 'Mine was wrong', inForce: 3 }), 403);
  });
});

describe('retiring a fact', () => {
  const retire = ({ browser }: Pick<SomeoneSignedIn, 'browser'>, id: string, inForce: number) => browser.post(`/api/facts/${id}/retire`).send({ reason: 'It never was', inForce });

  test('takes it out of the catalogue and keeps its history; it is not retired twice', async () => {
    const id = await worksEntered();
    await retire(moderator, id, 1).expect(200);
    expect(await FactName.query(people.knex).findById(id)).toBeUndefined();
    expect(await historyOf(author, id)).toMatchObject({ inForce: null, steps: [{ step: 'retired', by: { id: moderator.id } }, { step: 'version' }], can: { edit: false, flag: false } });
    expect((await problemOf(retire(moderator, id, 1), 409)).detail).toContain('retired');
    await problemOf(author.browser.post(`/api/facts/${id}/flags`).send({ reason: 'Gone?' }), 404);
    expect(await Notice.query(people.knex).where({ memberId: author.id, body: 'It was retired: It never was.' })).toHaveLength(1);
  });

  test.each<[FactName['kind'], string, RegExp]>([
    ['maker', 'Hesper Lathe Company', /Other facts rest on it: .*/],
    ['casting', 'B4406 (first pattern)', /B4406 \(first pattern\) (?:on|followed by) .*Change or retire that first/],
    ['series', '30 Crawler 3C', /30 Crawler 3C, 1\d+/],
  ])('is refused while others rest on it, naming them: a %s', async (kind, title, words) => {
    const id = await factCalled(people, kind, title);
    const { inForce } = await historyOf(moderator, id);
    expect((await problemOf(retire(moderator, id, inForce ?? 0), 409)).detail).toMatch(words);
    expect(await FactName.query(people.knex).findById(id)).toMatchObject({ title });
  });

  test('has what rested on it worked out again', async () => {
    const { id } = await Anchor.query(people.knex).orderBy('id').first().throwIfNotFound();
    const { inForce } = await historyOf(moderator, id);
    await retire(moderator, id, inForce ?? 0).expect(200);
    expect(await Rework.query(people.knex).where({ factId: id })).toMatchObject([{ version: null, state: 'waiting' }]);
    expect(await historyOf(author, id)).toMatchObject({ workingOut: true });
  });

  test('is for moderators of its maker', async () => {
    const id = await worksEntered();
    await problemOf(retire({ browser: people.browser() }, id, 1), 401);
    await problemOf(retire(author, id, 1), 403);
    await problemOf(retire(await someone(people, { role: 'moderator', moderates: ['skerry-foundry'] }), id, 1), 403);
    await problemOf(retire(moderator, NOBODY, 1), 404);
    expect(pathsOf(await problemOf(moderator.browser.post(`/api/facts/${id}/retire`).send({ reason: 'x', inForce: 1 }), 422))).toEqual(['reason']);
  });
});

describe('choosing a fact', () => {
  const list = (query: string) => people.browser().get(`/api/facts?${query}`);
  type Answer = { items: { title: string; kind: string; maker: { name: string } | null }[]; total: number };

  test('by kind, by part of its name, and within another', async () => {
    const { items } = (await list('kind=maker&q=hesper').expect(200)).body as Answer;
    expect(items).toEqual([expect.objectContaining({ kind: 'maker', title: 'Hesper Lathe Company', slug: 'hesper-lathe-company' })]);
    const crawler = await factCalled(people, 'model', '30 Crawler');
    const positions = (await list(`kind=position&within=${crawler}&limit=100`).expect(200)).body as Answer;
    expect(positions.items.length).toBeGreaterThan(10);
    expect(positions.items.every(({ title, maker }) => title.startsWith('30 Crawler, ') && maker?.name === 'Brackwater Tractor Works')).toBe(true);
    const block = await factCalled(people, 'position', '30 Crawler, Cylinder block');
    const castings = (await list(`kind=casting&within=${block}`).expect(200)).body as Answer;
    expect(castings.items.map(({ title }) => title)).toEqual(expect.arrayContaining(['B4406 (first pattern)', 'B5120 (second pattern)']));
    const works = (await list(`kind=works&within=${crawler}&limit=100`).expect(200)).body as Answer;
    expect(works.items.every(({ maker }) => maker?.name === 'Brackwater Tractor Works')).toBe(true);
  });

  test('every kind has its facts under the names their own module gives them', async () => {
    for (const kind of ['fitment', 'supersession', 'serial-range', 'anchor', 'cipher', 'wear-limit', 'part-type'] as const) {
      expect(((await list(`kind=${kind}&limit=1`).expect(200)).body as Answer).total, kind).toBeGreaterThan(0);
    }
  });

  test.each([
    ['kind=spanner', 'kind'],
    ['', 'kind'],
    [`kind=works&within=${NOBODY}`, 'within'],
    ['kind=works&within=x', 'within'],
  ])('not with ?%s', async (query, path) => {
    expect(pathsOf(await problemOf(list(query), 422))).toEqual([path]);
  });

  test('accounts by title', async () => {
    const answer = await people.browser().get('/api/accounts?q=lot%20list').expect(200);
    expect((answer.body as { items: object[] }).items).toHaveLength(1);
  });
});

describe('a flag', () => {
  const flag = ({ browser }: Pick<SomeoneSignedIn, 'browser'>, id: string, reason = 'Mine is dated 1937') => browser.post(`/api/facts/${id}/flags`).send({ reason });

  test('is raised by members, one at a time on each fact, and written down', async () => {
    const id = await worksEntered();
    const { id: flagId } = (await flag(author, id).expect(201)).body as { id: string };
    expect(await Flag.query(people.knex).findById(flagId)).toMatchObject({ factId: id, byId: author.id, reason: 'Mine is dated 1937', outcome: null });
    await problemOf(flag(author, id), 409);
    await flag(await someone(people), id).expect(201);
    await problemOf(flag({ browser: people.browser() }, id), 401);
    await problemOf(flag(author, NOBODY), 404);
    expect(pathsOf(await problemOf(flag(author, id, ' '), 422))).toEqual(['reason']);
    expect(await AuditRow.query(people.knex).where({ act: 'fact.flagged', actorId: author.id })).toMatchObject([{ subjectId: id, detail: { flagId } }]);
  });

  test('is settled by a moderator of its maker, once, and not by who raised it', async () => {
    const id = await worksEntered();
    const { id: flagId } = (await flag(author, id).expect(201)).body as { id: string };
    const settle = ({ browser }: Pick<SomeoneSignedIn, 'browser'>, reason = 'Looked into it') => browser.post(`/api/flags/${flagId}/settle`).send({ outcome: 'kept', reason });
    await problemOf(settle({ browser: people.browser() }), 401);
    await problemOf(settle(author), 404);
    await problemOf(settle(await someone(people, { role: 'moderator', moderates: ['skerry-foundry'] })), 404);
    await problemOf(settle(await someone(people, { role: 'registrar' })), 403);
    expect((await problemOf(settle(await someone(people, { role: 'moderator', strength: 'password' })), 403)).type).toBe('/problems/second-factor-owed');
    expect(pathsOf(await problemOf(moderator.browser.post(`/api/flags/${flagId}/settle`).send({ outcome: 'lost', reason: 'So so' }), 422))).toEqual(['outcome']);
    const answer = await settle(moderator).expect(200);
    expect(answer.body).toMatchObject({ id: flagId, settled: { by: { id: moderator.id }, outcome: 'kept', reason: 'Looked into it' } });
    expect((await problemOf(settle(await someone(people, { role: 'moderator' })), 409)).detail).toContain(`${moderator.displayName} left it as it is meanwhile: Looked into it`);
    expect(await Notice.query(people.knex).where({ memberId: author.id, body: 'Looked into it' })).toHaveLength(1);
    await problemOf(moderator.browser.post(`/api/flags/${NOBODY}/settle`).send({ outcome: 'kept', reason: 'So so' }), 404);
    const { id: own } = (await flag(moderator, id).expect(201)).body as { id: string };
    await problemOf(moderator.browser.post(`/api/flags/${own}/settle`).send({ outcome: 'kept', reason: 'So so' }), 403);
  });
});

describe('the register’s reading of a series', () => {
  const mark = ({ browser }: Pick<SomeoneSignedIn, 'browser'>, seriesId: string, accountId: string) => browser.post(`/api/series/${seriesId}/reading`).send({ accountId, reason: 'It is the works’ own' });

  test('is one of its accounts, marked by a moderator', async () => {
    const id = await factCalled(people, 'series', '30 Crawler 3C');
    const accounts = await SeriesAccount.query(people.knex).where({ seriesId: id }).orderBy('accountId');
    const preferred = accounts.find((one) => one.preferred);
    const rival = accounts.find((one) => !one.preferred);
    await problemOf(mark({ browser: people.browser() }, id, rival!.accountId), 401);
    await problemOf(mark(author, id, rival!.accountId), 403);
    await problemOf(mark(await someone(people, { role: 'moderator', moderates: ['skerry-foundry'] }), id, rival!.accountId), 403);
    await problemOf(mark(moderator, NOBODY, rival!.accountId), 404);
    await problemOf(mark(moderator, id, preferred!.accountId), 409);
    expect(pathsOf(await problemOf(mark(moderator, id, NOBODY), 422))).toEqual(['accountId']);
    await mark(moderator, id, rival!.accountId).expect(200, { accountId: rival!.accountId });
    expect(await SeriesAccount.query(people.knex).where({ seriesId: id, preferred: true })).toMatchObject([{ accountId: rival!.accountId }]);
    expect(await AuditRow.query(people.knex).where({ act: 'series.reading-marked', subjectId: id })).toMatchObject([
      { detail: { accountId: rival!.accountId, before: preferred!.accountId } },
    ]);
    expect(await Rework.query(people.knex).where({ factId: id })).toHaveLength(1);
  });
});
