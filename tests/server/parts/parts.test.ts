import { beforeAll, describe, expect, test } from 'vitest';
import { z } from 'zod';
import { PartItem, PartPage } from '#contract/parts.ts';
import { MachineModel } from '#db/models/machine-model.ts';
import { Machine } from '#db/models/machine.ts';
import { Maker } from '#db/models/maker.ts';
import { PartType } from '#db/models/part-type.ts';
import { Part } from '#db/models/part.ts';
import { Position } from '#db/models/position.ts';
import { someone } from '#tests/support/contributing.ts';
import type { SomeoneSignedIn } from '#tests/support/contributing.ts';
import { addMachine, addPhoto, fitPart } from '#tests/support/factories/record.ts';
import { usePeople } from '#tests/support/people.ts';
import { BARE_PART, markSeenBy, readBy, recordMark, recordPart, wantedMark } from '#tests/support/recording.ts';

const people = usePeople();
let holder: SomeoneSignedIn;
let other: SomeoneSignedIn;
let moderator: SomeoneSignedIn;
beforeAll(async () => {
  holder = await someone(people);
  other = await someone(people);
  moderator = await someone(people, { role: 'moderator' });
  await people.knex('reworks').update({ state: 'done', finished_at: people.knex.fn.now() });
});

const NOWHERE = '01980000-0000-7000-8000-000000000001';
const List = z.object({ items: z.array(PartItem), next: z.string().nullable(), total: z.number().optional() });

async function pageFor({ browser }: Pick<SomeoneSignedIn, 'browser'>, id: string): Promise<PartPage> {
  return PartPage.parse((await browser.get(`/api/parts/${id}`).expect(200)).body);
}

describe('putting a part on record', () => {
  test('takes a photo and nothing else', async () => {
    const photo = await addPhoto(holder.id, people.knex);
    expect(await recordPart(holder, { photoIds: [photo.id], visibility: 'private' })).toMatchObject({
      title: 'Part not named yet', partType: null, maker: null, casting: null, number: null, photo: { id: photo.id }, photos: [{ id: photo.id, name: 'gear case.jpg' }],
      marks: [], fittedTo: null, foundOn: null, isMine: true, can: { change: true, remove: true, addMark: true }, revision: 1, workingOut: false,
    });
  });

  test('takes all there is to say, with its number as read', async () => {
    const type = await PartType.query(people.knex).orderBy('id').first().throwIfNotFound();
    const maker = await Maker.query(people.knex).orderBy('id').first().throwIfNotFound();
    const model = await MachineModel.query(people.knex).orderBy('id').first().throwIfNotFound();
    const said = { partTypeId: type.id, makerId: maker.id, foundModelId: model.id, called: ' The blue one ', foundSerial: '3C1207', condition: 'Cracked at the flange', note: 'Under the bench' };
    const part = await recordPart(holder, { ...said, number: 'zz 9?[od]' });
    expect(part).toMatchObject({
      title: type.name, partType: { slug: type.slug }, maker: { slug: maker.slug }, number: 'ZZ-9?[OD]', called: 'The blue one', condition: 'Cracked at the flange', note: 'Under the bench',
      foundOn: { modelId: model.id, model: { slug: model.slug }, serial: '3C1207' }, marks: [{ kind: 'casting-number', technique: 'cast', reading: 'ZZ-9?[OD]', evidence: 'claimed' }],
    });
    expect(await pageFor(other, part.id)).toMatchObject({ note: null, foundOn: { serial: '3C12••' }, isMine: false, can: { change: false, remove: false, addMark: false } });
    expect((await people.actsOf(part.id)).map(({ act, actorId }) => [act, actorId])).toEqual([['part.recorded', holder.id]]);
  });

  test('masks a serial that reads as none but for its first two glyphs', async () => {
    const { id } = await recordPart(holder, { foundSerial: 'No. eleven' });
    expect((await pageFor(other, id)).foundOn?.serial).toBe('No••••••••');
  });

  test.each<[string, object]>([
    ['a type that is not there', { partTypeId: NOWHERE }],
    ['a maker that is not there', { makerId: NOWHERE }],
    ['a model that is not there', { foundModelId: NOWHERE }],
    ['a photo that is not there', { photoIds: [NOWHERE] }],
    ['a photo twice', { photoIds: [NOWHERE, NOWHERE] }],
    ['a number that is none', { number: '[' }],
    ['an empty number', { number: '' }],
    ['a serial that is too long', { foundSerial: '1'.repeat(41) }],
    ['what it has not', { weight: 12 }],
    ['a link', { visibility: 'by-link' }],
  ])('refuses %s', async (_, given) => {
    await holder.browser.post('/api/parts').send({ ...BARE_PART, number: null, ...given }).expect(422);
  });

  test('refuses another’s photo, a visitor, and what is no JSON', async () => {
    const photo = await addPhoto(other.id, people.knex);
    const answer = await holder.browser.post('/api/parts').send({ ...BARE_PART, number: null, photoIds: [photo.id] }).expect(422);
    expect(answer.body).toMatchObject({ errors: [{ path: ['photoIds', 0] }] });
    await people.browser().post('/api/parts').send({ ...BARE_PART, number: null }).expect(401);
    await holder.browser.post('/api/parts').set('Content-Type', 'application/json').send('{').expect(400);
  });

  test('takes no more than forty marks', async () => {
    const part = await recordPart(holder);
    await people.knex('marks').insert(Array.from({ length: 40 }, (_, place) => ({ id: `${part.id.slice(0, -2)}${String(place).padStart(2, '0')}`, partId: part.id, kind: 'other', technique: 'cast' })));
    await holder.browser.post(`/api/parts/${part.id}/marks`).send({ kind: 'other', technique: 'cast', photos: [], reading: null }).expect(409);
  });
});

describe('who does what with a part', () => {
  test.each<['visitor' | 'holder' | 'other member' | 'moderator', ofPublic: { readonly read: number; readonly change: number }, ofPrivate: { readonly read: number; readonly change: number }]>([
    ['visitor', { read: 200, change: 401 }, { read: 404, change: 401 }],
    ['other member', { read: 200, change: 403 }, { read: 404, change: 404 }],
    ['moderator', { read: 200, change: 403 }, { read: 404, change: 404 }],
    ['holder', { read: 200, change: 200 }, { read: 200, change: 200 }],
  ])('%s', async (who, ofPublic, ofPrivate) => {
    const browser = { visitor: people.browser(), holder: holder.browser, 'other member': other.browser, moderator: moderator.browser }[who];
    for (const [visibility, wanted] of [['public', ofPublic], ['private', ofPrivate]] as const) {
      const { id, revision } = await recordPart(holder, { visibility });
      await browser.get(`/api/parts/${id}`).expect(wanted.read);
      await browser.put(`/api/parts/${id}`).send({ ...BARE_PART, revision }).expect(wanted.change);
      await browser.post(`/api/parts/${id}/marks`).send({ kind: 'other', technique: 'cast', photos: [], reading: 'A' }).expect(wanted.change === 200 ? 201 : wanted.change);
      await browser.delete(`/api/parts/${id}`).expect(wanted.change);
    }
    await browser.get(`/api/parts/${NOWHERE}`).expect(404);
    await browser.get('/api/parts/nothing').expect(422);
    await browser.delete(`/api/parts/${NOWHERE}`).expect(who === 'visitor' ? 401 : 404);
  });
});

describe('changing a part', () => {
  test('that is made private or public again changes what is wanted of its marks', async () => {
    const mark = await wantedMark(people, holder, { reading: 'KPOI' });
    const partId = String(mark.part?.id);
    const wishes = async () => (await markSeenBy(holder, mark)).wantsReading;
    expect(await wishes()).toBe(true);
    const hidden = await holder.browser.put(`/api/parts/${partId}`).send({ ...BARE_PART, visibility: 'private', revision: 1 }).expect(200);
    expect(hidden.body).toMatchObject({ visibility: 'private', revision: 2 });
    expect(await wishes()).toBe(false);
    await other.browser.get(`/api/marks/${mark.id}`).expect(404);
    await holder.browser.put(`/api/parts/${partId}`).send({ ...BARE_PART, revision: 2 }).expect(200);
    expect(await wishes()).toBe(true);
  });

  test('works it out anew, and puts its photos in the order they are sent', async () => {
    const [one, two, three] = [await addPhoto(holder.id, people.knex), await addPhoto(holder.id, people.knex), await addPhoto(holder.id, people.knex)];
    const maker = await Maker.query(people.knex).findOne({ slug: 'brackwater-tractor-works' }).throwIfNotFound();
    const part = await recordPart(holder, { photoIds: [one.id, two.id] });
    const mark = await recordMark(holder, part.id, { reading: 'RLKON' });
    expect(mark.dates).toBeNull();
    const changed = await holder.browser.put(`/api/parts/${part.id}`).send({ ...BARE_PART, makerId: maker.id, photoIds: [three.id, one.id], revision: 1 }).expect(200);
    expect(PartPage.parse(changed.body).photos.map(({ id }) => id)).toEqual([three.id, one.id]);
    expect((await markSeenBy(holder, mark)).dates).toMatchObject({ status: 'dated', candidates: [{ from: '1939-07-25' }] });
  });

  test('of a revision that moved on is refused', async () => {
    const { id } = await recordPart(holder);
    const answers = await Promise.all([1, 2].map(() => holder.browser.put(`/api/parts/${id}`).send({ ...BARE_PART, called: 'Tray', revision: 1 })));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
    await holder.browser.put(`/api/parts/${id}`).send({ ...BARE_PART, revision: 'x' }).expect(422);
  });
});

describe('taking a part off the record', () => {
  test('takes its marks along and leaves its photos', async () => {
    const mark = await wantedMark(people, holder, { reading: 'KPOI' });
    const partId = String(mark.part?.id);
    await holder.browser.delete(`/api/parts/${partId}`).expect(200, { done: true });
    await holder.browser.get(`/api/marks/${mark.id}`).expect(404);
    expect(await people.knex('photos').where({ id: mark.photos[0]?.photo.id })).toHaveLength(1);
    await holder.browser.delete(`/api/parts/${partId}`).expect(404);
  });

  test('is refused while it is on a machine, and once others have read a mark of it', async () => {
    const position = await Position.query(people.knex).orderBy('id').first().throwIfNotFound();
    const machine = await addMachine({ modelId: position.modelId, serialAsStamped: 'XX 4711', ownerId: holder.id, visibility: 'private' }, people.knex);
    const part = await recordPart(holder, { called: 'Tray' });
    await fitPart(await Part.query(people.knex).findById(part.id).throwIfNotFound(), machine, position, people.knex);
    await holder.browser.delete(`/api/parts/${part.id}`).expect(409);
    expect((await pageFor(holder, part.id)).fittedTo).toMatchObject({ serial: 'XX4711', position: position.name });
    expect((await pageFor(other, part.id)).fittedTo).toBeNull();
    await Machine.query(people.knex).findById(machine.id).patch({ visibility: 'public' });
    expect((await pageFor(other, part.id)).fittedTo).toMatchObject({ serial: 'XX47••' });

    const mark = await wantedMark(people, holder);
    await readBy(other, mark, 'KPOI');
    await holder.browser.delete(`/api/parts/${String(mark.part?.id)}`).expect(409);
  });
});

describe('one’s bench', () => {
  test('is one’s own parts alone, by type, words and where they are, page by page', async () => {
    const keeper = await someone(people);
    const [type] = await PartType.query(people.knex).orderBy('id').limit(1);
    const position = await Position.query(people.knex).orderBy('id').first().throwIfNotFound();
    const machine = await addMachine({ modelId: position.modelId, serialAsStamped: 'XX 4712', ownerId: keeper.id }, people.knex);
    const tray = await recordPart(keeper, { called: 'A tray', visibility: 'private' });
    const typed = await recordPart(keeper, { partTypeId: type?.id, number: 'QZ8' });
    const fitted = await recordPart(keeper, { called: 'Z cover', condition: 'Sound' });
    await fitPart(await Part.query(people.knex).findById(fitted.id).throwIfNotFound(), machine, position, people.knex);
    const ids = async (query: string): Promise<readonly string[]> => List.parse((await keeper.browser.get(`/api/parts?${query}`).expect(200)).body).items.map(({ id }) => id);
    expect(await ids('')).toEqual([fitted.id, typed.id, tray.id]);
    expect(await ids('sort=recorded')).toEqual([tray.id, typed.id, fitted.id]);
    expect((await ids('sort=title'))[0]).toBe(tray.id);
    expect(await ids('on=bench')).toEqual([typed.id, tray.id]);
    expect(await ids('on=machine')).toEqual([fitted.id]);
    expect(await ids(`partType=${String(type?.slug)}`)).toEqual([typed.id]);
    expect(await ids('q=tray')).toEqual([tray.id]);
    expect(await ids('q=qz8')).toEqual([typed.id]);
    expect(await ids('q=SOUND')).toEqual([fitted.id]);

    const first = List.parse((await keeper.browser.get('/api/parts?sort=title&limit=2').expect(200)).body);
    expect(first.total).toBe(3);
    const second = List.parse((await keeper.browser.get(`/api/parts?sort=title&limit=2&after=${String(first.next)}`).expect(200)).body);
    expect([...first.items, ...second.items].map(({ id }) => id).toSorted()).toEqual([tray, typed, fitted].map(({ id }) => id).toSorted());
    expect(second.next).toBeNull();

    await people.browser().get('/api/parts').expect(401);
    await keeper.browser.get('/api/parts?on=shelf').expect(422);
    expect(List.parse((await other.browser.get('/api/parts?limit=100').expect(200)).body).items.map(({ id }) => id)).not.toContain(tray.id);
  });
});
