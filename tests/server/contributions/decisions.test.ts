import { v7 as uuidV7 } from 'uuid';
import { beforeEach, describe, expect, test } from 'vitest';
import { ContributionPage, readEvidence } from '#contract/contributions.ts';
import { ContributionEvidence } from '#db/models/contribution-evidence.ts';
import { ContributionOpening } from '#db/models/contribution-opening.ts';
import { Mark } from '#db/models/mark.ts';
import { FactName } from '#db/models/fact-name.ts';
import { Notice } from '#db/models/notice.ts';
import { decide, enter, entered, factCalled, historyOf, OWN_KNOWLEDGE, putForward, someone, start } from '#tests/support/contributing.ts';
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

/** Works of Brackwater that nobody has put forward yet. */
async function works(): Promise<{ kind: 'works'; payload: { makerId: string; name: string; place: string | null; note: string | null } }> {
  names += 1;
  return { kind: 'works', payload: { makerId: await factCalled(people, 'maker', 'Brackwater Tractor Works'), name: `Yard ${names}`, place: null, note: null } };
}

async function putForwardWorks(): Promise<ContributionPage> {
  return putForward(author, await start(author, await works()));
}

describe('who decides', () => {
  test('moderators of the maker, never the author, a registrar or a member', async () => {
    const put = await putForwardWorks();
    const elsewhere = await someone(people, { role: 'moderator', moderates: ['hesper-lathe-company'] });
    const owed = await someone(people, { role: 'moderator', strength: 'password' });
    await problemOf(decide({ ...author, browser: people.browser() }, put, 'enter'), 401);
    await problemOf(decide(await someone(people), put, 'enter'), 404);
    await problemOf(decide(elsewhere, put, 'enter'), 404);
    expect((await problemOf(decide(owed, put, 'enter'), 403)).type).toBe('/problems/second-factor-owed');
    await problemOf(decide(await someone(people, { role: 'registrar' }), put, 'enter'), 403);
    await problemOf(decide(author, put, 'enter'), 403);
    const within = await someone(people, { role: 'moderator', moderates: ['brackwater-tractor-works'] });
    await decide(within, put, 'enter').expect(200);
  });

  test('not a moderator’s own, even with all makers', async () => {
    const put = await putForward(moderator, await start(moderator, await works()));
    expect(put.can.decide).toBe(false);
    await problemOf(decide(moderator, put, 'enter'), 403);
  });

  test('what belongs to no maker, or leaves one for another, only moderators of all makers', async () => {
    const within = await someone(people, { role: 'moderator', moderates: ['brackwater-tractor-works', 'hesper-lathe-company'] });
    const partType = await putForward(author, await start(author, { kind: 'part-type', payload: { name: `Lug ${names}`, note: null, caution: null } }));
    await problemOf(decide(within, partType, 'enter'), 404);
    const draft = await works();
    const factId = await entered(author, moderator, draft);
    const hesper = await factCalled(people, 'maker', 'Hesper Lathe Company');
    const moved = await start(author, { kind: 'works', subjectId: factId, payload: { ...draft.payload, makerId: hesper }, sources: [OWN_KNOWLEDGE] });
    const put = await putForward(author, moved);
    await problemOf(decide(within, put, 'enter'), 404);
    await enter(moderator, put);
  });

  test.each<[string, object, readonly string[]]>([
    ['without a reason', { decision: 'enter', reason: ' ', revision: 2 }, ['reason']],
    ['otherwise than there is', { decision: 'shelve', reason: 'As it is', revision: 2 }, ['decision']],
    ['on no revision', { decision: 'enter', reason: 'As it is' }, ['revision']],
  ])('nobody decides %s', async (_what, body, paths) => {
    const put = await putForwardWorks();
    expect(pathsOf(await problemOf(moderator.browser.post(`/api/contributions/${put.id}/decision`).send(body), 422))).toEqual(paths);
    await problemOf(moderator.browser.post(`/api/contributions/${NOBODY}/decision`).send({ decision: 'enter', reason: 'As it is', revision: 1 }), 404);
  });
});

describe('a decision', () => {
  test('of two moderators at once is the first one’s, and the second is told what that did', async () => {
    const other = await someone(people, { role: 'moderator' });
    const put = await putForwardWorks();
    const both = await Promise.all([decide(moderator, put, 'enter', 'The letter says so'), decide(other, put, 'turn-down', 'It never was')]);
    expect(both.map(({ status }) => status).toSorted()).toEqual([200, 409]);
    const first = both[0].status === 200 ? { who: moderator, did: /entered it on \d{4}-\d\d-\d\d at \d\d:\d\d UTC: The letter says so/ } : { who: other, did: /turned it down on .*: It never was/ };
    const { detail } = both.find(({ status }) => status === 409)?.body as { detail: string };
    expect(detail).toContain(first.who.displayName);
    expect(detail).toMatch(first.did);
  });

  test('turned down ends it, with its reason', async () => {
    const put = await putForwardWorks();
    const page = ContributionPage.parse((await decide(moderator, put, 'turn-down', 'That was an agent’s').expect(200)).body);
    expect(page).toMatchObject({ state: 'turned-down', enteredVersion: null, subject: null, decisions: [{ decision: 'turn-down', by: { id: moderator.id } }] });
    expect(await FactName.query(people.knex).findOne({ kind: 'works', title: put.title })).toBeUndefined();
    expect(await Notice.query(people.knex).where({ memberId: author.id })).toMatchObject([{ title: `Turned down: ${put.title}`, body: 'That was an agent’s' }]);
    await problemOf(author.browser.post(`/api/contributions/${put.id}/put-forward`).send({ revision: put.revision }), 409);
    await problemOf(author.browser.post(`/api/contributions/${put.id}/withdraw`).send({ revision: put.revision }), 409);
  });

  test('is not made on what its author withdrew, or changed since', async () => {
    const put = await putForwardWorks();
    await problemOf(author.browser.post(`/api/contributions/${put.id}/withdraw`).send({ revision: 1 }), 409);
    await author.browser.post(`/api/contributions/${put.id}/withdraw`).send({ revision: put.revision }).expect(200);
    expect((await problemOf(decide(moderator, put, 'enter'), 409)).detail).toContain('withdrew');
    const again = await putForwardWorks();
    await decide(moderator, again, 'send-back', 'Where is it?').expect(200);
    const sent = await putForward(author, again);
    expect((await problemOf(decide(moderator, again, 'enter'), 409)).detail).toContain('changed elsewhere');
    await enter(moderator, sent);
  });

  test('to enter is refused in words once the rest of the catalogue says otherwise, and nothing is left of it', async () => {
    const { makerId } = (await works()).payload;
    const model = { kind: 'model' as const, payload: { makerId, name: `Model ${names}`, machineKind: 'crawler-tractor', made: null, note: null } };
    const [first, second] = [await putForward(author, await start(author, model)), await putForward(author, await start(author, model))];
    await enter(moderator, first);
    const problem = await problemOf(decide(moderator, second, 'enter'), 409);
    expect(pathsOf(problem)).toEqual(['payload.name']);
    expect(problem.detail).toContain('another model called so');
    expect((await moderator.browser.get(`/api/contributions/${second.id}`)).body).toMatchObject({ state: 'put-forward', decisions: [], faults: [{ path: ['payload', 'name'] }] });
    expect(await FactName.query(people.knex).where({ kind: 'model', title: `Model ${names}` })).toHaveLength(1);
  });
});

describe('a change of what moved on', () => {
  test('is not entered; its author sees both, carries theirs over and puts it forward again', async () => {
    const draft = await works();
    const factId = await entered(author, moderator, draft);
    const mine = await start(author, { kind: 'works', subjectId: factId });
    const saved = await author.browser
      .put(`/api/contributions/${mine.id}`)
      .send({ revision: 1, payload: { ...draft.payload, place: 'Nether Wick' }, sources: mine.citations, note: null })
      .expect(200);
    const put = await putForward(author, ContributionPage.parse(saved.body));
    const other = await someone(people);
    const theirs = await start(other, { kind: 'works', subjectId: factId, payload: { ...draft.payload, note: 'Burnt down.' }, sources: [OWN_KNOWLEDGE] });
    await enter(moderator, await putForward(other, theirs));

    expect((await problemOf(decide(moderator, put, 'enter'), 409)).detail).toMatch(/begun on version 1, and version 2 is in force/);
    await decide(moderator, put, 'send-back', 'Carry it over, please.').expect(200);
    const seen = ContributionPage.parse((await author.browser.get(`/api/contributions/${put.id}`)).body);
    expect(seen).toMatchObject({ base: { version: 1 }, inForce: { version: 2, payload: { note: 'Burnt down.' } } });
    expect(seen.differences).toEqual([
      { path: ['place'], label: 'Place', before: null, after: 'Nether Wick' },
      { path: ['note'], label: 'Note', before: 'Burnt down.', after: null },
    ]);
    const carry = (baseVersion: number) =>
      author.browser
        .put(`/api/contributions/${put.id}`)
        .send({ revision: seen.revision, payload: { ...draft.payload, place: 'Nether Wick', note: 'Burnt down.' }, sources: seen.citations, note: null, baseVersion });
    await problemOf(carry(1), 409);
    const carried = ContributionPage.parse((await carry(2).expect(200)).body);
    await enter(moderator, await putForward(author, carried));
    expect(await historyOf(author, factId)).toMatchObject({ inForce: 3, steps: [{ payload: { place: 'Nether Wick', note: 'Burnt down.' } }, {}, {}] });
    expect(await Notice.query(people.knex).where({ memberId: other.id, body: 'Another version took the place of yours.' })).toHaveLength(1);
  });

  test('is not entered once the fact is retired', async () => {
    const draft = await works();
    const factId = await entered(author, moderator, draft);
    const change = await start(author, { kind: 'works', subjectId: factId, payload: { ...draft.payload, place: 'Ardle' }, sources: [OWN_KNOWLEDGE] });
    const put = await putForward(author, change);
    await moderator.browser.post(`/api/facts/${factId}/retire`).send({ reason: 'Never was', inForce: 1 }).expect(200);
    expect((await problemOf(decide(moderator, put, 'enter'), 409)).detail).toContain('retired');
    await decide(moderator, put, 'turn-down', 'There is nothing to change').expect(200);
  });
});

describe('what is said and found out about it', () => {
  test('comments are between its author and moderators, on the whole or one field; the other is told', async () => {
    const put = await putForwardWorks();
    const comment = ({ browser }: SomeoneSignedIn, body: object) => browser.post(`/api/contributions/${put.id}/comments`).send(body);
    await comment(moderator, { path: 'name', text: 'Is that how they wrote it?' }).expect(200);
    const page = ContributionPage.parse((await comment(author, { path: null, text: 'On the gate, yes.' }).expect(200)).body);
    expect(page.comments).toMatchObject([
      { author: { id: moderator.id }, path: 'name', text: 'Is that how they wrote it?' },
      { author: { id: author.id }, path: null, text: 'On the gate, yes.' },
    ]);
    for (const { id } of [author, moderator]) expect(await Notice.query(people.knex).where({ memberId: id, kind: 'contribution' })).toHaveLength(1);
    await problemOf(comment(await someone(people, { role: 'registrar' }), { path: null, text: 'Hm' }), 403);
    await problemOf(comment(await someone(people), { path: null, text: 'Hm' }), 404);
    expect(pathsOf(await problemOf(comment(moderator, { path: null, text: '  ' }), 422))).toEqual(['text']);
    await enter(moderator, put);
    const seen = ContributionPage.parse((await people.browser().get(`/api/contributions/${put.id}`).expect(200)).body);
    expect(seen).toMatchObject({ state: 'entered', comments: [], decisions: [{ decision: 'enter' }], can: { comment: false, seeEvidence: true } });
  });

  test('evidence is gathered when it is put forward and when a moderator opens it, and kept', async () => {
    const put = await putForwardWorks();
    const gather = ({ browser }: Pick<SomeoneSignedIn, 'browser'>) => browser.post(`/api/contributions/${put.id}/evidence`);
    const gathered = (await gather(moderator).expect(200)).body as { items: { occasion: string }[] };
    expect(gathered.items.map(({ occasion }) => occasion)).toEqual(['opened', 'put-forward']);
    await problemOf(gather(author), 403);
    await problemOf(gather({ browser: people.browser() }), 401);
    await problemOf(gather(await someone(people)), 404);
    await problemOf(gather(await someone(people, { role: 'moderator', strength: 'password' })), 403);
    await decide(moderator, put, 'turn-down').expect(200);
    await problemOf(gather(moderator), 409);
    expect(await ContributionEvidence.query(people.knex).where({ contributionId: put.id })).toHaveLength(2);
  });

  test('evidence lists no mark that was taken from sight since, and still counts it', async () => {
    const put = await putForwardWorks();
    const [seen, hidden] = await Mark.query(people.knex).joinRelated('part').where('part.visibility', 'public').orderBy('marks.id').limit(2);
    const items = [seen, hidden].map((mark) => ({ subject: { kind: 'mark', id: mark?.id, title: 'A mark' }, mark: 'K12', text: 'Seen' }));
    const findings = { groups: [{ code: 'dates', title: 'Dates', count: 2, of: 2, items: [...items, { subject: null, mark: null, text: 'And more' }], unlisted: 0 }], figures: [] };
    await ContributionEvidence.query(people.knex).insert({ id: uuidV7(), contributionId: put.id, revision: put.revision, occasion: 'opened', findings });
    await people.knex('parts').where({ id: hidden?.partId ?? '' }).update({ visibility: 'private' });
    const { groups } = readEvidence.answer.parse((await author.browser.get(`/api/contributions/${put.id}/evidence`).expect(200)).body).items[0] ?? { groups: [] };
    expect(groups).toEqual([{ ...findings.groups[0], items: [items[0], { subject: null, mark: null, text: 'And more' }], unlisted: 1 }]);
  });

  test('whoever has it open is told to other moderators for a minute', async () => {
    const put = await putForwardWorks();
    const other = await someone(people, { role: 'moderator' });
    const open = ({ browser }: Pick<SomeoneSignedIn, 'browser'>) => browser.post(`/api/contributions/${put.id}/opened`);
    expect((await open(moderator).expect(200)).body).toEqual({ openWith: [] });
    const seenBy = { openWith: [{ id: moderator.id, displayName: moderator.displayName }] };
    expect((await open(other).expect(200)).body).toEqual(seenBy);
    expect((await other.browser.get(`/api/contributions/${put.id}`)).body).toMatchObject(seenBy);
    expect((await author.browser.get(`/api/contributions/${put.id}`)).body).toMatchObject({ openWith: [] });
    await ContributionOpening.query(people.knex).where({ memberId: moderator.id }).patch({ seenAt: people.knex.raw(`now() - interval '61 seconds'`) });
    expect((await open(other).expect(200)).body).toEqual({ openWith: [] });
    await problemOf(open(author), 403);
    await problemOf(open(await someone(people, { role: 'registrar' })), 403);
    await problemOf(open(await someone(people)), 404);
    await problemOf(open({ browser: people.browser() }), 401);
  });
});
