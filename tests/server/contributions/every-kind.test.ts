import { beforeAll, describe, expect, test } from 'vitest';
import { ContributionPage } from '#contract/contributions.ts';
import { Evidence } from '#contract/evidence.ts';
import { FactHistory } from '#contract/facts.ts';
import { KINDS } from '#contract/kinds.ts';
import { FactName } from '#db/models/fact-name.ts';
import { Notice } from '#db/models/notice.ts';
import { FACT_KINDS } from '#domain/vocabulary.ts';
import type { FactKind } from '#domain/vocabulary.ts';
import { decide, enter, factCalled, historyOf, OWN_KNOWLEDGE, putForward, replayTrail, someone, start } from '#tests/support/contributing.ts';
import type { SomeoneSignedIn } from '#tests/support/contributing.ts';
import { TEST_CIPHER } from '#tests/support/factories/catalogue.ts';
import { usePeople } from '#tests/support/people.ts';
import { problemOf } from '#tests/support/problem.ts';

const people = usePeople();

type Payload = Readonly<Record<string, unknown>>;
/** What a new fact of a kind says, what a change of it says instead, and sources where one that is known does not do. */
type Case = { readonly payload: Payload; readonly change: Payload; readonly title: string; readonly sources?: readonly object[] };

let cases: Readonly<Record<FactKind, Case>>;
let author: SomeoneSignedIn;
let second: SomeoneSignedIn;
let moderator: SomeoneSignedIn;

beforeAll(async () => {
  [author, second, moderator] = [await someone(people), await someone(people), await someone(people, { role: 'moderator' })];
  const brackwater = await factCalled(people, 'maker', 'Brackwater Tractor Works');
  const skerry = (await FactName.query(people.knex).findOne({ slug: 'skerry-foundry' }).throwIfNotFound()).id;
  const crawler = await FactName.query(people.knex).findOne({ slug: 'brackwater-30-crawler' }).throwIfNotFound();
  const b4406 = await FactName.query(people.knex).findOne({ slug: 'brackwater-b4406' }).throwIfNotFound();
  const position = await FactName.query(people.knex).findOne({ kind: 'position', modelId: crawler.id, partTypeId: b4406.partTypeId }).throwIfNotFound();
  const series = await FactName.query(people.knex).findOne({ kind: 'series', modelId: crawler.id }).throwIfNotFound();
  const elsewhere = await FactName.query(people.knex).findOne({ slug: 'brackwater-b3102' }).throwIfNotFound();
  const last = await FactName.query(people.knex).findOne({ slug: 'brackwater-b5120' }).throwIfNotFound();
  const note = null;
  cases = {
    maker: {
      payload: { name: 'Ardle & Finch', place: 'Ardle', buildsMachines: false, poursIron: true, foundryMark: 'A and F in a ring', founded: 1902, closed: null, note },
      change: { closed: 1931 },
      title: 'Ardle & Finch',
    },
    works: { payload: { makerId: brackwater, name: 'Quay Yard', place: null, note }, change: { place: 'Nether Wick' }, title: 'Brackwater Tractor Works, Quay Yard' },
    model: {
      payload: { makerId: brackwater, name: '12 Garden', machineKind: 'crawler-tractor', made: { from: '1949-01-01', to: null }, note },
      change: { made: { from: '1949-01-01', to: '1951-12-31' } },
      title: '12 Garden',
    },
    'part-type': { payload: { name: 'Idler bracket', note, caution: null }, change: { caution: 'Heavy: 60 kg. Lift it with tackle.' }, title: 'Idler bracket' },
    position: {
      payload: { modelId: crawler.id, partTypeId: b4406.partTypeId, name: 'Spare, under the seat', ordinal: 90, weight: 1, lead: { from: 10, to: 90 }, note },
      change: { weight: 0.5 },
      title: '30 Crawler, Spare, under the seat',
      sources: [OWN_KNOWLEDGE, { ...OWN_KNOWLEDGE, field: 'lead' }],
    },
    casting: {
      payload: {
        makerId: brackwater,
        pouredById: skerry,
        partTypeId: b4406.partTypeId,
        number: 'B 9901',
        pattern: 'second pattern',
        made: { from: '1938-01-01', to: '1940-12-31' },
        note,
        tells: [{ place: 'Rear face', tell: 'Two bosses.' }],
        partNumbers: [{ number: '9901-1', note: null }],
      },
      change: { tells: [{ place: 'Rear face', tell: 'Two bosses.' }, { place: 'Flange', tell: 'Seven bolts.' }] },
      title: 'B 9901 (second pattern)',
    },
    fitment: {
      payload: { positionId: position.id, castingId: elsewhere.id, seriesId: series.id, numbers: { from: '1001', to: '1100' }, verdict: 'does-not-belong', note },
      change: { numbers: { from: '1001', to: '1200' } },
      title: `${elsewhere.title} on ${position.title}`,
    },
    supersession: {
      payload: { oldId: elsewhere.id, newId: last.id, interchange: 'both-ways', note },
      change: { interchange: 'new-for-old' },
      title: `${elsewhere.title} followed by ${last.title}`,
    },
    series: { payload: { modelId: crawler.id, prefix: 'XP', worksId: null, label: null, note }, change: { label: 'for export' }, title: '30 Crawler XP' },
    'serial-range': {
      payload: {
        seriesId: series.id,
        accountId: null,
        numbers: { from: '1001', to: '1200' },
        built: { from: '1938-08-01', to: '1939-02-28' },
        precision: 'month',
        meaning: 'built',
        standing: 'solid',
        inOrder: true,
        note,
      },
      change: { standing: 'conjectural' },
      title: `${series.title}, 1001 to 1200`,
    },
    anchor: {
      payload: { seriesId: series.id, number: '1023', built: { from: '1938-09-12', to: '1938-09-12' }, precision: 'day', meaning: 'sold', note },
      change: { note: 'From the invoice.' },
      title: `${series.title}, 1023`,
    },
    cipher: {
      payload: { makerId: brackwater, foundryId: skerry, title: 'Brackwater works letters', machineKind: null, definition: TEST_CIPHER, note },
      change: { definition: { ...TEST_CIPHER, usedTo: '1956-12-31' } },
      title: 'Brackwater works letters',
    },
    'wear-limit': {
      payload: {
        partTypeId: b4406.partTypeId,
        modelId: crawler.id,
        measure: 'Bore, front end',
        unit: 'mm',
        asBuilt: { from: 101.6, to: 101.65 },
        direction: 'most',
        limit: 102.1,
        method: null,
        note,
      },
      change: { limit: 102.25 },
      title: '',
    },
  };
  const partType = await FactName.query(people.knex).findById(b4406.partTypeId ?? '').throwIfNotFound();
  cases = { ...cases, 'wear-limit': { ...cases['wear-limit'], title: `${partType.title} on ${crawler.title}, Bore, front end` } };
});

describe('every kind, from a draft to what it became', () => {
  test.each(FACT_KINDS)('%s', async (kind) => {
    const { payload, change, title, sources } = cases[kind];
    const draft = await start(author, { kind, payload, ...(sources ? { sources } : {}) });
    expect(draft).toMatchObject({ state: 'drafted', title, subject: null, base: null, inForce: null, faults: [], can: { edit: true, putForward: true, discard: true, decide: false } });
    expect(draft.differences.length).toBeGreaterThan(0);
    expect(draft.differences.every(({ before }) => before === null)).toBe(true);

    const first = await putForward(author, draft);
    expect(first).toMatchObject({ state: 'put-forward', can: { edit: false, withdraw: true, seeEvidence: true } });
    const evidence = await author.browser.get(`/api/contributions/${first.id}/evidence`).expect(200);
    expect(Evidence.array().parse((evidence.body as { items: unknown }).items)).toMatchObject([{ occasion: 'put-forward', revision: first.revision }]);

    const back = ContributionPage.parse((await decide(moderator, first, 'send-back', 'Say where it was seen.').expect(200)).body);
    expect(back).toMatchObject({ state: 'sent-back', decisions: [{ decision: 'send-back', reason: 'Say where it was seen.' }] });
    expect(await Notice.query(people.knex).where({ memberId: author.id, href: `/contributions/${first.id}` })).toMatchObject([
      { kind: 'contribution', title: `Sent back: ${title}`, body: 'Say where it was seen.' },
    ]);

    const saved = await author.browser
      .put(`/api/contributions/${back.id}`)
      .send({ revision: back.revision, payload: back.payload, sources: back.citations, note: 'Seen at the Nether Wick gathering.' })
      .expect(200);
    const again = await putForward(author, ContributionPage.parse(saved.body));
    const entered = await enter(moderator, again);
    expect(entered).toMatchObject({ state: 'entered', enteredVersion: 1, subject: { kind, title }, can: { decide: false } });
    const factId = entered.subject?.id ?? '';
    const history = await historyOf(second, factId);
    expect(history).toMatchObject({ inForce: 1, steps: [{ version: 1, inForce: true, by: { id: author.id }, decidedBy: { id: moderator.id }, payload, contributionId: first.id }] });

    const edit = await start(second, { kind, subjectId: factId, baseVersion: 1 });
    expect(edit).toMatchObject({ payload, base: { version: 1 }, inForce: { version: 1 }, differences: [] });
    const changed = await second.browser
      .put(`/api/contributions/${edit.id}`)
      .send({ revision: edit.revision, payload: { ...payload, ...change }, sources: edit.citations, note: null })
      .expect(200);
    expect(ContributionPage.parse(changed.body).differences.length).toBeGreaterThan(0);
    await enter(moderator, await putForward(second, ContributionPage.parse(changed.body)));
    expect((await author.browser.get(`/api/contributions/${first.id}`)).body).toMatchObject({ state: 'superseded' });
    expect(await historyOf(author, factId)).toMatchObject({ inForce: 2, steps: [{ version: 2, payload: { ...payload, ...change } }, { version: 1, inForce: false }] });

    const broughtBack = await moderator.browser.post(`/api/facts/${factId}/bring-back`).send({ version: 1, reason: 'The first was right', inForce: 2 }).expect(200);
    expect(FactHistory.parse(broughtBack.body)).toMatchObject({ inForce: 3, steps: [{ version: 3, broughtBack: 1, by: { id: author.id }, payload }, { version: 2 }, { version: 1 }] });

    const [slug] = await FactName.query(people.knex).where({ id: factId }).select('slug');
    const retired = await moderator.browser.post(`/api/facts/${factId}/retire`).send({ reason: 'It never was', inForce: 3 }).expect(200);
    expect(FactHistory.parse(retired.body)).toMatchObject({
      fact: { id: factId, title, slug: null },
      inForce: null,
      steps: [{ step: 'retired', version: 3, reason: 'It never was' }, { version: 3, inForce: false }, {}, {}],
    });
    expect(await FactName.query(people.knex).findById(factId)).toBeUndefined();
    await problemOf(second.browser.post('/api/contributions').send({ kind, subjectId: factId }), 409);

    await moderator.browser.post(`/api/facts/${factId}/bring-back`).send({ version: 2, reason: 'It was, after all', inForce: null }).expect(200);
    expect(await historyOf(author, factId)).toMatchObject({ inForce: 4 });
    expect(await FactName.query(people.knex).where({ id: factId }).select('slug')).toEqual([slug]);
    expect((await replayTrail(people)).get(factId)).toBe(4);
  });

  test('is one module of each, by one name', () => {
    expect(Object.keys(KINDS).toSorted()).toEqual([...FACT_KINDS].toSorted());
  });
});
