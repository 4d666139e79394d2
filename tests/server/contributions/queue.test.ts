import { beforeAll, describe, expect, test } from 'vitest';
import { z } from 'zod';
import { gatherEvidence, listMyContributions, readContributor } from '#contract/contributions.ts';
import { QueueItem } from '#contract/moderation.ts';
import { Contribution } from '#db/models/contribution.ts';
import { Member } from '#db/models/member.ts';
import { DEMO_SIGN_INS } from '#fixtures/demo/sign-ins.ts';
import { checkProposal } from '#server/services/contributions/check-proposal.ts';
import { contributionTitle } from '#server/services/contributions/contribution-title.ts';
import { scopeOf } from '#server/services/contributions/scope-of.ts';
import { entered, factCalled, putForward, someone, start } from '#tests/support/contributing.ts';
import type { SomeoneSignedIn } from '#tests/support/contributing.ts';
import { usePeople } from '#tests/support/people.ts';
import { pathsOf, problemOf } from '#tests/support/problem.ts';

const people = usePeople();

const Queue = z.object({ items: z.array(QueueItem), next: z.string().nullable(), total: z.number().optional() });
type Page = z.infer<typeof Queue>;

async function queue({ browser }: Pick<SomeoneSignedIn, 'browser'>, query = ''): Promise<Page> {
  return Queue.parse((await browser.get(`/api/moderation/queue?limit=100&${query}`).expect(200)).body);
}

function titles({ items }: Pick<Page, 'items'>): readonly string[] {
  return items.map((item) => (item.type === 'flag' ? item.flag.fact.title : item.contribution.title));
}

let moderator: SomeoneSignedIn;
beforeAll(async () => {
  moderator = await someone(people, { role: 'moderator' });
});

describe('the queue', () => {
  test('holds what was put forward and flagged, the oldest first, and filters it', async () => {
    const all = await queue(moderator);
    const moments = all.items.map(({ at }) => at);
    expect(moments).toEqual(moments.toSorted());
    expect(new Set(all.items.map(({ type }) => type))).toEqual(new Set(['contribution', 'flag']));
    expect(titles(await queue(moderator, 'sort=-at'))).toEqual(titles(all).toReversed());
    expect((await queue(moderator, 'type=flag')).items.map(({ type }) => type)).toEqual(['flag', 'flag']);
    expect(titles(await queue(moderator, 'kind=cipher'))).toEqual(['Brackwater ten-letter key', 'Hesper month letter']);
    expect(titles(await queue(moderator, 'kind=cipher&maker=hesper-lathe-company'))).toEqual(['Hesper month letter']);
    expect(titles(await queue(moderator, 'q=b4407'))).toEqual(['B4407']);
  });

  test('pages without repeating', async () => {
    const { items, next, total } = Queue.parse((await moderator.browser.get('/api/moderation/queue?limit=2').expect(200)).body);
    const rest = await queue(moderator, `after=${next ?? ''}`);
    expect(titles({ items: [...items, ...rest.items] })).toEqual(titles(await queue(moderator)));
    expect(total).toBe(items.length + rest.items.length);
  });

  test('takes no more statements for many than for a few', async () => {
    let statements = 0;
    const count = (): void => {
      statements += 1;
    };
    people.knex.on('query', count);
    const taken = async (path: string): Promise<number> => {
      statements = 0;
      await moderator.browser.get(path).expect(200);
      return statements;
    };
    try {
      expect(await taken('/api/moderation/queue?limit=9')).toBe(await taken('/api/moderation/queue?limit=100'));
      expect(await taken('/api/facts?kind=fitment&limit=5')).toBe(await taken('/api/facts?kind=fitment&limit=100'));
      const harrow = await Member.query(people.knex).findOne({ displayName: 'Harrow Lane' }).throwIfNotFound();
      expect(await taken(`/api/contributors/${harrow.id}?limit=5`)).toBe(await taken(`/api/contributors/${harrow.id}?limit=100`));
    } finally {
      people.knex.removeListener('query', count);
    }
  });

  test('shows a moderator the makers in scope, a registrar everything, and nobody else anything', async () => {
    const hesper = await someone(people, { role: 'moderator', moderates: ['hesper-lathe-company'] });
    expect(titles(await queue(hesper))).toEqual(['Hesper Lathe Company, Canal Shop', 'Hesper month letter']);
    expect(titles(await queue(await someone(people, { role: 'registrar' })))).toEqual(titles(await queue(moderator)));
    await problemOf(people.browser().get('/api/moderation/queue'), 401);
    await problemOf((await someone(people)).browser.get('/api/moderation/queue'), 404);
    const owed = await someone(people, { role: 'moderator', strength: 'password' });
    expect((await problemOf(owed.browser.get('/api/moderation/queue'), 403)).type).toBe('/problems/second-factor-owed');
    expect(pathsOf(await problemOf(moderator.browser.get('/api/moderation/queue?type=spam'), 422))).toEqual(['type']);
  });

  test('tells one’s own, who has what open, and forgets what is decided', async () => {
    const second = await someone(people, { role: 'moderator' });
    const put = await putForward(second, await start(second, { kind: 'part-type', payload: { name: 'Queue peg', note: null, caution: null } }));
    const find = async (who: SomeoneSignedIn) => (await queue(who, 'q=queue%20peg')).items;
    await moderator.browser.post(`/api/contributions/${put.id}/opened`).expect(200);
    expect(await find(second)).toMatchObject([{ own: true, openWith: [{ id: moderator.id }] }]);
    expect(await find(moderator)).toMatchObject([{ own: false, openWith: [] }]);
    await moderator.browser.post(`/api/contributions/${put.id}/decision`).send({ decision: 'turn-down', reason: 'No', revision: put.revision }).expect(422);
    await moderator.browser.post(`/api/contributions/${put.id}/decision`).send({ decision: 'turn-down', reason: 'No such thing', revision: put.revision }).expect(200);
    expect(await find(moderator)).toEqual([]);
  });
});

describe('one’s own contributions', () => {
  test('are listed, the last changed first, by state and kind', async () => {
    const author = await someone(people);
    const first = await start(author, { kind: 'part-type', payload: { name: 'Peg', note: null, caution: null } });
    const second = await start(author, { kind: 'maker', payload: { name: 'Peg & Sons' } });
    await putForward(author, first);
    const list = async (query = ''): Promise<readonly string[]> => {
      const answer = await author.browser.get(`/api/me/contributions?${query}`).expect(200);
      return listMyContributions.answer.parse(answer.body).items.map(({ id }) => id);
    };
    expect(await list()).toEqual([first.id, second.id]);
    expect(await list('state=drafted')).toEqual([second.id]);
    expect(await list('kind=part-type')).toEqual([first.id]);
    await problemOf(people.browser().get('/api/me/contributions'), 401);
    expect(pathsOf(await problemOf(author.browser.get('/api/me/contributions?state=superseded'), 422))).toEqual(['state']);
  });
});

describe('a contributor', () => {
  test('is shown with what they gave, the last first', async () => {
    const harrow = await Member.query(people.knex).findOne({ displayName: 'Harrow Lane' }).throwIfNotFound();
    const answer = await people.browser().get(`/api/contributors/${harrow.id}?limit=5`).expect(200);
    const { contributor, items, kinds } = readContributor.answer.parse(answer.body);
    expect(contributor).toMatchObject({ id: harrow.id, displayName: 'Harrow Lane' });
    expect(items.map(({ enteredAt }) => enteredAt)).toEqual(items.map(({ enteredAt }) => enteredAt).toSorted().toReversed());
    expect(kinds.find(({ kind }) => kind === 'casting')?.count).toBeGreaterThan(10);
    const ciphers = await people.browser().get(`/api/contributors/${harrow.id}?kind=cipher&q=ten-letter`).expect(200);
    expect(ciphers.body).toMatchObject({ items: [{ fact: { slug: 'brackwater-ten-letter' }, version: 1, inForce: false }] });
  });

  test('who gave nothing is nobody but to themselves; what they give appears', async () => {
    const author = await someone(people);
    await problemOf(people.browser().get(`/api/contributors/${author.id}`), 404);
    expect((await author.browser.get(`/api/contributors/${author.id}`).expect(200)).body).toMatchObject({ items: [], kinds: [] });
    await problemOf(people.browser().get('/api/contributors/018f0000-0000-7000-8000-000000000000'), 404);
    const makerId = await factCalled(people, 'maker', 'Skerry Foundry');
    const id = await entered(author, moderator, { kind: 'works', payload: { makerId, name: 'Upper Yard', place: null, note: null } });
    const page = await people.browser().get(`/api/contributors/${author.id}`).expect(200);
    expect(page.body).toMatchObject({ items: [{ fact: { id }, version: 1, inForce: true }], kinds: [{ kind: 'works', count: 1 }] });
  });
});

describe('the demo', () => {
  test('has contributions in every state, by its sign-ins and for its moderator', async () => {
    const states = await Contribution.query(people.knex).distinct('state');
    expect(new Set(states.map(({ state }) => state))).toEqual(new Set(['drafted', 'put-forward', 'sent-back', 'entered', 'turned-down', 'withdrawn']));
    const byName = async (name: string) => Member.query(people.knex).findOne({ displayName: name }).throwIfNotFound();
    for (const { displayName, role } of DEMO_SIGN_INS.filter((one) => one.role === 'member')) {
      const own = await Contribution.query(people.knex).where({ authorId: (await byName(displayName)).id });
      expect(own.length, `${displayName}, ${role}`).toBeGreaterThan(1);
    }
    const ottoline = await byName('Ottoline Marsh');
    const brackwater = await factCalled(people, 'maker', 'Brackwater Tractor Works');
    const waiting = await Contribution.query(people.knex).where({ state: 'put-forward', makerId: brackwater }).whereNot({ authorId: ottoline.id });
    expect(waiting.length).toBeGreaterThanOrEqual(5);
    expect(new Set(waiting.map(({ kind }) => kind)).size).toBeGreaterThanOrEqual(4);
  });

  test('has evidence for each that waits', async () => {
    for (const { id, title } of await Contribution.query(people.knex).where({ state: 'put-forward' })) {
      const answer = await moderator.browser.post(`/api/contributions/${id}/evidence`);
      expect(answer.status, title).toBe(200);
      expect(gatherEvidence.answer.parse(answer.body).items[0], title).toMatchObject({ occasion: 'opened', revision: 2 });
    }
  });

  test('says what the register would say of each', async () => {
    for (const { kind, subjectId, authorId, payload, citations, title, makerId, state } of await Contribution.query(people.knex).where({ putForwardAt: null }).orWhereIn('state', ['put-forward', 'sent-back'])) {
      expect(await contributionTitle(kind, subjectId, payload, people.knex)).toBe(title);
      const checked = await checkProposal({ kind, subjectId, authorId, payload, citations }, people.knex);
      if (state === 'drafted') continue;
      expect(checked, title).toMatchObject({ ok: true });
      if (checked.ok) expect(await scopeOf(kind, subjectId, checked.value.payload, people.knex)).toBe(makerId);
    }
  });
});
