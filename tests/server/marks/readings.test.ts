import { beforeAll, describe, expect, test } from 'vitest';
import { z } from 'zod';
import { MarkOnList, MarkToRead } from '#contract/marks.ts';
import type { MarkPage } from '#contract/marks.ts';
import { PartPage } from '#contract/parts.ts';
import { AuditRow } from '#db/models/audit-row.ts';
import { Casting } from '#db/models/casting.ts';
import { Maker } from '#db/models/maker.ts';
import { MarkLook } from '#db/models/mark-look.ts';
import { MarkPhoto } from '#db/models/mark-photo.ts';
import { Notice } from '#db/models/notice.ts';
import { Part } from '#db/models/part.ts';
import { Position } from '#db/models/position.ts';
import { Reading } from '#db/models/reading.ts';
import { someone } from '#tests/support/contributing.ts';
import type { SomeoneSignedIn } from '#tests/support/contributing.ts';
import { addMachine, addPhoto, fitPart } from '#tests/support/factories/record.ts';
import { usePeople } from '#tests/support/people.ts';
import { deskOf, markSeenBy, readBy, recordMark, recordPart, wantedMark } from '#tests/support/recording.ts';

const people = usePeople();
let holder: SomeoneSignedIn;
let ben: SomeoneSignedIn;
let cass: SomeoneSignedIn;
let moderator: SomeoneSignedIn;
beforeAll(async () => {
  holder = await someone(people);
  ben = await someone(people);
  cass = await someone(people);
  moderator = await someone(people, { role: 'moderator' });
  // Nothing of the demo waits to be worked out: figures would be held back.
  await people.knex('reworks').update({ state: 'done', finished_at: people.knex.fn.now() });
});

const visitor = () => ({ browser: people.browser() });
const NOWHERE = '01980000-0000-7000-8000-000000000001';

/** A casting of the demo whose number is its own, a machine of the holder's, and the position there that the casting goes to. */
async function county() {
  const { knex } = people;
  const maker = await Maker.query(knex).findOne({ slug: 'brackwater-tractor-works' }).throwIfNotFound();
  const alike = knex('castings as other').whereRaw('other.number_key = castings.number_key and other.id <> castings.id');
  const casting = await Casting.query(knex).where({ makerId: maker.id }).whereNull('pouredById').whereNotNull('made').whereNotExists(alike).orderBy('id').first().throwIfNotFound();
  const position = await Position.query(knex).where({ partTypeId: casting.partTypeId }).orderBy('id').first().throwIfNotFound();
  const machine = await addMachine({ modelId: position.modelId, serialAsStamped: 'ZZ 98765', ownerId: holder.id }, knex);
  return { maker, casting, position, machine };
}

describe('reading blind', () => {
  test('nothing of what was read, claimed or worked out is told before one reads or asks', async () => {
    const { maker, position, casting, machine } = await county();
    const makerId = maker.id;
    const mark = await wantedMark(people, holder, {
      reading: 'RLKON',
      part: { makerId, partTypeId: position.partTypeId, called: `Case ${casting.number} of 1939`, foundSerial: 'ZZ 98765', number: casting.number, condition: 'Dated RLKON' },
    });
    const partId = String(mark.part?.id);
    await fitPart(await Part.query(people.knex).findById(partId).throwIfNotFound(), machine, position, people.knex);
    expect(mark).toMatchObject({ hidden: false, reading: 'RLKON', wantsReading: true, evidence: 'photographed', casting: { id: casting.id }, dates: { status: 'dated', candidates: [{ from: '1939-07-25' }] } });

    const secrets = ['RLKON', '1939', casting.number, casting.slug, casting.id, 'ZZ987', 'ZZ 987', machine.id];
    const secretsIn = (text: string): readonly string[] => secrets.filter((secret) => text.includes(secret));
    for (const path of [`/api/marks/${mark.id}`, `/api/marks/${mark.id}/desk`]) expect(secretsIn((await ben.browser.get(path).expect(200)).text), path).toEqual([]);
    for (const path of ['/api/marks', '/api/marks/to-read?limit=100']) {
      const { items } = z.object({ items: z.array(z.looseObject({ id: z.string() })) }).parse((await ben.browser.get(path).expect(200)).body);
      const listed = items.filter(({ id }) => id === mark.id);
      expect(listed, path).toHaveLength(1);
      expect(secretsIn(JSON.stringify(listed)), path).toEqual([]);
    }
    for (const reader of [ben, moderator]) {
      expect(await markSeenBy(reader, mark)).toMatchObject({
        hidden: true, reading: null, inForce: null, readings: [], part: null, casting: null, machine: null, dates: null, can: { read: true, change: false, remove: false },
      });
      expect(await deskOf(reader, mark)).toMatchObject({ blind: true, first: false, isHolder: false, mine: null, part: null, narrowing: null });
    }
    // Its number has no photo, so nobody else is asked to read that; what it leads to is kept back all the same.
    const part = PartPage.parse((await ben.browser.get(`/api/parts/${partId}`).expect(200)).body);
    expect(part).toMatchObject({
      casting: null, called: null, foundOn: null, fittedTo: null, note: null, condition: null, number: casting.number,
      marks: [{ hidden: false, reading: casting.number }, { hidden: true, reading: null, dates: null }],
    });
    expect(secretsIn(JSON.stringify(part))).toEqual([casting.number]);

    // Nor from whether it is found, nor where it stands among others.
    for (const search of ['number=RLKON', 'number=RL?ON', 'from=1939-07-25&to=1939-07-25', 'q=RLKON', 'q=of+1939', 'sort=reading&kind=date-code&limit=100&number=R*']) {
      const ids = async ({ browser }: Pick<SomeoneSignedIn, 'browser'>) =>
        z.object({ items: z.array(MarkOnList) }).parse((await browser.get(`/api/marks?${search}&maker=${String(mark.maker?.slug)}`).expect(200)).body).items.map(({ id }) => id);
      expect(await ids(ben), search).not.toContain(mark.id);
      expect(await ids(holder), search).toContain(mark.id);
      expect(await ids(visitor()), search).toContain(mark.id);
    }

    const read = await readBy(ben, mark, 'RLKDN');
    expect(read).toMatchObject({ hidden: false, reading: 'RLK[DO]N', casting: { id: casting.id }, part: { id: partId }, readings: [{ text: 'RLKDN', isMine: true, independent: true, asHolder: false }, { text: 'RLKON', isMine: false, asHolder: true }] });
    expect(await deskOf(ben, mark)).toMatchObject({ blind: false, mine: { text: 'RLKDN' }, narrowing: { makerId, from: casting.made?.from, to: casting.made?.to } });
  });

  test('visitors, who can’t read, and its holder see everything', async () => {
    const mark = await wantedMark(people, holder, { reading: 'KPOI' });
    await readBy(ben, mark, 'KP0I');
    expect(await markSeenBy(visitor(), mark)).toMatchObject({ hidden: false, reading: 'KP[0O]I', can: { read: false } });
    expect(await markSeenBy(holder, mark)).toMatchObject({ hidden: false, reading: 'KP[0O]I', readings: [{ isMine: false }, { isMine: true }], can: { read: true, change: true, remove: true } });
    expect(await deskOf(holder, mark)).toMatchObject({ blind: false, isHolder: true, mine: { text: 'KPOI' } });
  });

  test('who asks is shown it, and no longer reads independently', async () => {
    const mark = await wantedMark(people, holder, { reading: 'KPOI' });
    const shown = await ben.browser.post(`/api/marks/${mark.id}/looks`).expect(200);
    expect(shown.body).toMatchObject({ hidden: false, reading: 'KPOI', readings: [{ text: 'KPOI' }] });
    await ben.browser.post(`/api/marks/${mark.id}/looks`).expect(200);
    expect(await MarkLook.query(people.knex).where({ markId: mark.id })).toHaveLength(1);
    expect(await deskOf(ben, mark)).toMatchObject({ blind: false });
    const read = await readBy(ben, mark, 'KPXX');
    expect(read).toMatchObject({ reading: 'KPOI', inForce: { text: 'KPOI', whole: { agree: 1, readers: 1 } }, readings: [{ text: 'KPXX', independent: false, replaced: false }, { text: 'KPOI' }] });
    await holder.browser.post(`/api/marks/${mark.id}/looks`).expect(200);
    expect(await MarkLook.query(people.knex).where({ markId: mark.id })).toHaveLength(1);
  });

  test('reading a mark nobody has read is kept from its holder’s claim', async () => {
    const mark = await wantedMark(people, holder, { part: { called: 'Case of 1939' } });
    expect(await deskOf(ben, mark)).toMatchObject({ blind: true, first: true, part: null, narrowing: null });
    expect(await deskOf(holder, mark)).toMatchObject({ blind: false, first: true, part: { title: 'Case of 1939', casting: null, made: null }, narrowing: { makerId: null, from: null, to: null } });
    await readBy(ben, mark, 'KPOI');
    expect(await deskOf(ben, mark)).toMatchObject({ blind: false, part: { title: 'Case of 1939' } });
  });

  test('is offered to members who have neither read it nor looked, those asked for longest first', async () => {
    const own = await wantedMark(people, ben);
    const first = await wantedMark(people, holder, { kind: 'plate' });
    const second = await wantedMark(people, holder, { kind: 'plate', reading: 'KPOI' });
    const looked = await wantedMark(people, holder, { kind: 'plate', reading: 'KPOI' });
    const unphotographed = await recordMark(holder, (await recordPart(holder)).id, { kind: 'plate', reading: 'KPOI' });
    await ben.browser.post(`/api/marks/${looked.id}/looks`).expect(200);
    const offered = async () => {
      const answer = await ben.browser.get('/api/marks/to-read?kind=plate&limit=100').expect(200);
      expect(answer.text).not.toContain('KPOI');
      return z.object({ items: z.array(MarkToRead) }).parse(answer.body).items.map(({ id }) => id);
    };
    expect((await offered()).filter((id) => [own, first, second, looked, unphotographed].some((mark) => mark.id === id))).toEqual([first.id, second.id]);
    await readBy(ben, first, 'KPOI');
    expect(await offered()).not.toContain(first.id);
    await people.browser().get('/api/marks/to-read').expect(401);
  });
});

describe('the reading in force', () => {
  test('comes of independent readers, glyph by glyph; evidence and the wish for more with it', async () => {
    const [dee, eve, finn] = [await someone(people), await someone(people), await someone(people)];
    const mark = await wantedMark(people, holder, { reading: 'BBOCB' });
    expect(await readBy(ben, mark, 'BBDCB')).toMatchObject({ reading: 'BB[DO]CB', evidence: 'photographed', wantsReading: true });
    const third = await readBy(cass, mark, 'bb o cb');
    expect(third).toMatchObject({
      reading: 'BBOCB',
      evidence: 'confirmed',
      wantsReading: true,
      inForce: {
        text: 'BBOCB',
        whole: { agree: 2, readers: 3 },
        places: [{ agree: 3 }, { agree: 3 }, { settled: 'O', position: 2, agree: 2, readers: 3, said: [{ text: 'O', by: [holder.displayName, cass.displayName] }, { text: 'D', by: [ben.displayName] }] }, { agree: 3 }, { agree: 3 }],
      },
    });
    await readBy(dee, mark, 'BBOCB');
    expect(await readBy(eve, mark, 'BBOCB')).toMatchObject({ wantsReading: false, inForce: { whole: { agree: 4, readers: 5 } } });
    // Its page shows them to everybody now, so a sixth is not independent.
    expect(await markSeenBy(finn, mark)).toMatchObject({ hidden: false });
    expect((await readBy(finn, mark, 'XXXXX')).inForce?.whole.readers).toBe(5);
  });

  test('three who agree are enough; the holder’s own don’t confirm, nor does a mark without a photo', async () => {
    const mark = await wantedMark(people, holder, { reading: 'KPOI' });
    await readBy(holder, mark, 'KPOI');
    expect(await markSeenBy(holder, mark)).toMatchObject({ evidence: 'photographed', wantsReading: true, readings: [{ replaced: false, independent: true }, { replaced: true }] });
    expect(await readBy(ben, mark, 'KPOI')).toMatchObject({ evidence: 'confirmed', wantsReading: true });
    expect(await readBy(cass, mark, 'KPOI')).toMatchObject({ evidence: 'confirmed', wantsReading: false });
    const { photoId } = await MarkPhoto.query(people.knex).findOne({ markId: mark.id }).throwIfNotFound();
    const without = await holder.browser.delete(`/api/marks/${mark.id}/photos/${photoId}`).expect(200);
    expect(without.body).toMatchObject({ evidence: 'claimed', wantsReading: false, photos: [], reading: 'KPOI' });
  });

  test('works its part out at once', async () => {
    const { maker, position, casting } = await county();
    const makerId = maker.id;
    const part = await recordPart(holder, { makerId, partTypeId: position.partTypeId });
    expect(part).toMatchObject({ casting: null, number: null, workingOut: false });
    const number = await recordMark(holder, part.id, { kind: 'casting-number', reading: casting.number });
    expect(number).toMatchObject({ casting: { id: casting.id }, dates: null });
    const date = await recordMark(holder, part.id, { reading: 'BBOCB' });
    expect(date.dates).toMatchObject({ status: 'several', total: 2 });
    const again = await readBy(holder, date, 'B-BO-CB');
    expect(again.dates).toMatchObject({ status: 'dated', candidates: [{ from: '1941-01-13', to: '1941-01-13', share: 1 }] });
    const back = await holder.browser.delete(`/api/readings/${String(again.readings[0]?.id)}`).expect(200);
    expect(back.body).toMatchObject({ reading: 'BBOCB', dates: { total: 2 } });
    const other = await holder.browser.put(`/api/marks/${date.id}`).send({ kind: 'other', technique: 'stamped', revision: date.revision }).expect(200);
    expect(other.body).toMatchObject({ kind: 'other', technique: 'stamped', dates: null, revision: date.revision + 1 });
  });

  test('counts both of two who read at once', async () => {
    for (let round = 0; round < 3; round += 1) {
      const mark = await wantedMark(people, holder, { reading: 'KPOI' });
      await Promise.all([readBy(ben, mark, 'KPOI'), readBy(cass, mark, 'KPDI')]);
      expect(await markSeenBy(holder, mark)).toMatchObject({ reading: 'KPOI', inForce: { whole: { agree: 2, readers: 3 } }, evidence: 'confirmed' });
      expect(await Reading.query(people.knex).where({ markId: mark.id, independent: true })).toHaveLength(3);
    }
  });
});

describe('taking a reading back', () => {
  test('leaves it on record, uncounted; a second time changes nothing more', async () => {
    const mark = await wantedMark(people, holder, { reading: 'KPOI' });
    const { readings } = await readBy(ben, mark, 'KPDI');
    const path = `/api/readings/${String(readings[0]?.id)}`;
    const [one, two] = await Promise.all([ben.browser.delete(path).expect(200), ben.browser.delete(path).expect(200)]);
    for (const { body } of [one, two]) expect(body).toMatchObject({ reading: 'KPOI', readings: [{ text: 'KPDI', replaced: false }, { takenBackAt: null }] });
    const taken = z.object({ readings: z.tuple([z.object({ takenBackAt: z.string() })], z.unknown()) });
    expect(taken.parse(one.body).readings[0]).toEqual(taken.parse(two.body).readings[0]);
    expect(await AuditRow.query(people.knex).where({ subjectId: String(readings[0]?.id) }).orderBy(['at', 'id'])).toMatchObject([
      { act: 'reading.made', actorId: ben.id, detail: { markId: mark.id } },
      { act: 'reading.taken-back', actorId: ben.id },
    ]);
    // They have seen what others read, so another reading of theirs is not independent.
    expect(await readBy(ben, mark, 'KPOI')).toMatchObject({ evidence: 'photographed', readings: [{ independent: false }, {}, {}] });
  });

  test('of the only reading leaves the mark unread', async () => {
    const mark = await wantedMark(people, holder);
    const { readings } = await readBy(ben, mark, 'KPOI');
    const answer = await ben.browser.delete(`/api/readings/${String(readings[0]?.id)}`).expect(200);
    expect(answer.body).toMatchObject({ reading: null, inForce: null, dates: null, readings: [{ text: 'KPOI' }] });
  });

  test('is only for whoever made it, and tells nobody of readings they may not know', async () => {
    const mark = await wantedMark(people, holder, { reading: 'KPOI' });
    const path = `/api/readings/${String(mark.readings[0]?.id)}`;
    await people.browser().delete(path).expect(401);
    await ben.browser.delete(path).expect(404);
    await readBy(ben, mark, 'KPOI');
    await ben.browser.delete(path).expect(403);
    await moderator.browser.delete(path).expect(404);
    await ben.browser.delete(`/api/readings/${NOWHERE}`).expect(404);
    await ben.browser.delete('/api/readings/nothing').expect(422);
  });
});

describe('a reading', () => {
  test('is refused where it is none, of nothing, or from a photo that is not of the mark', async () => {
    const mark = await wantedMark(people, holder);
    const other = await wantedMark(people, holder);
    const path = `/api/marks/${mark.id}/readings`;
    const foreign = String(other.photos[0]?.photo.id);
    for (const body of [{}, { text: '', photoId: null }, { text: '[', photoId: null }, { text: 'A', photoId: 'x' }, { text: 'A', photoId: foreign }, { text: 'A', photoId: NOWHERE }, { text: 'A', photoId: null, more: 1 }, { text: 'A'.repeat(33), photoId: null }]) {
      await ben.browser.post(path).send(body).expect(422);
    }
    await ben.browser.post(path).set('Content-Type', 'application/json').send('{').expect(400);
    await people.browser().post(path).send({ text: 'A', photoId: null }).expect(401);
    await ben.browser.post(`/api/marks/${NOWHERE}/readings`).send({ text: 'A', photoId: null }).expect(404);
    expect(await Reading.query(people.knex).where({ markId: mark.id })).toEqual([]);
    await ben.browser.post(path).send({ text: 'a', photoId: mark.photos[0]?.photo.id }).expect(201);
  });

  test('of one member of one mark ends at twenty', async () => {
    const mark = await wantedMark(people, holder);
    await Reading.query(people.knex).insert(
      Array.from({ length: 20 }, (_, place) => ({ id: `01980000-0000-7000-8000-${String(place).padStart(4, '0')}${mark.id.slice(-8)}`, markId: mark.id, readerId: ben.id, text: 'A' })),
    );
    await ben.browser.post(`/api/marks/${mark.id}/readings`).send({ text: 'B', photoId: null }).expect(409);
  });

  test('by another is told to the holder, once an hour for one reader, and without a name', async () => {
    const keeper = await someone(people);
    const mark = await wantedMark(people, keeper, { reading: 'KPOI', part: { called: 'Gear case' } });
    await readBy(ben, mark, 'KPOI');
    await readBy(ben, mark, 'KPOB');
    await readBy(cass, mark, 'KPOI');
    const notices = await Notice.query(people.knex).where({ memberId: keeper.id, kind: 'reading' });
    expect(notices).toHaveLength(2);
    for (const { body, href } of notices) {
      expect(href).toBe(`/marks/${mark.id}`);
      expect(body).toContain('Gear case');
      for (const name of [ben.displayName, cass.displayName]) expect(body).not.toContain(name);
    }
    expect(await Notice.query(people.knex).whereIn('memberId', [ben.id, cass.id]).where({ kind: 'reading', href: `/marks/${mark.id}` })).toEqual([]);
  });
});

describe('who does what with a mark', () => {
  let shown: MarkPage;
  let kept: MarkPage;
  beforeAll(async () => {
    shown = await wantedMark(people, holder, { reading: 'KPOI' });
    kept = await wantedMark(people, holder, { reading: 'KPOI', part: { visibility: 'private' } });
  });

  type Who = 'visitor' | 'holder' | 'other member' | 'moderator';
  const browserOf = (who: Who) => ({ visitor: people.browser(), holder: holder.browser, 'other member': cass.browser, moderator: moderator.browser })[who];

  test.each<[who: Who, ofPublic: Readonly<Record<'read' | 'desk' | 'reading' | 'look' | 'change' | 'place', number>>, ofPrivate: number]>([
    ['visitor', { read: 200, desk: 401, reading: 401, look: 401, change: 401, place: 401 }, 404],
    ['holder', { read: 200, desk: 200, reading: 201, look: 200, change: 200, place: 200 }, 200],
    ['other member', { read: 200, desk: 200, reading: 201, look: 200, change: 403, place: 403 }, 404],
    ['moderator', { read: 200, desk: 200, reading: 201, look: 200, change: 403, place: 403 }, 404],
  ])('%s', async (who, ofPublic, ofPrivate) => {
    const browser = browserOf(who);
    const photoId = String(shown.photos[0]?.photo.id);
    const form = { kind: 'date-code', technique: 'cast', revision: shown.revision };
    await browser.get(`/api/marks/${shown.id}`).expect(ofPublic.read);
    await browser.get(`/api/marks/${shown.id}/desk`).expect(ofPublic.desk);
    await browser.post(`/api/marks/${shown.id}/readings`).send({ text: 'KPOI', photoId: null }).expect(ofPublic.reading);
    await browser.post(`/api/marks/${shown.id}/looks`).expect(ofPublic.look);
    await browser.put(`/api/marks/${shown.id}`).send(form).expect(ofPublic.change);
    await browser.put(`/api/marks/${shown.id}/photos/${photoId}`).send({ region: null }).expect(ofPublic.place);
    await browser.get(`/api/marks/${kept.id}`).expect(ofPrivate);
    if (who !== 'visitor') await browser.get(`/api/marks/${kept.id}/desk`).expect(ofPrivate);
    if (ofPrivate === 404 && who !== 'visitor') {
      await browser.post(`/api/marks/${kept.id}/readings`).send({ text: 'KPOI', photoId: null }).expect(404);
      await browser.post(`/api/marks/${kept.id}/looks`).expect(404);
      await browser.put(`/api/marks/${kept.id}`).send(form).expect(404);
      await browser.delete(`/api/marks/${kept.id}`).expect(404);
    }
    if (who !== 'holder') await browser.delete(`/api/marks/${shown.id}`).expect(who === 'visitor' ? 401 : 403);
  });
});

describe('changing a mark', () => {
  test('of a revision that moved on is refused', async () => {
    const mark = await wantedMark(people, holder);
    const form = { kind: 'plate', technique: 'cast', revision: mark.revision };
    const answers = await Promise.all([1, 2].map(() => holder.browser.put(`/api/marks/${mark.id}`).send(form)));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
    await holder.browser.put(`/api/marks/${mark.id}`).send({ ...form, kind: 'nothing' }).expect(422);
  });

  test('places it on photos of one’s own, twelve at most', async () => {
    const part = await recordPart(holder);
    const mark = await recordMark(holder, part.id);
    const photo = await addPhoto(holder.id, people.knex);
    const path = `/api/marks/${mark.id}/photos/${photo.id}`;
    const region = { left: 0.25, top: 0.5, width: 0.75, height: 0.125 };
    expect((await holder.browser.put(path).send({ region, turn: -12.5, mirrored: true }).expect(200)).body).toMatchObject({
      photos: [{ region, turn: -12.5, mirrored: true, photo: { id: photo.id, name: 'gear case.jpg' } }], evidence: 'photographed', wantsReading: true,
    });
    expect((await holder.browser.put(path).send({ region: null }).expect(200)).body).toMatchObject({ photos: [{ region: null, turn: 0, mirrored: false }] });
    expect((await markSeenBy(ben, mark)).photos[0]?.photo.name).toBeNull();
    for (const body of [{}, { region: { ...region, left: 0.5 } }, { region: { ...region, width: 0 } }, { region, turn: 181 }]) await holder.browser.put(path).send(body).expect(422);

    const foreign = await addPhoto(ben.id, people.knex);
    for (const id of [foreign.id, NOWHERE]) {
      await holder.browser.put(`/api/marks/${mark.id}/photos/${id}`).send({ region: null }).expect(404);
      await holder.browser.delete(`/api/marks/${mark.id}/photos/${id}`).expect(404);
      await holder.browser.post(`/api/parts/${part.id}/marks`).send({ kind: 'plate', technique: 'cast', reading: null, photos: [{ photoId: id, region: null }] }).expect(422);
    }
    for (let count = 1; count < 12; count += 1) await holder.browser.put(`/api/marks/${mark.id}/photos/${(await addPhoto(holder.id, people.knex)).id}`).send({ region: null }).expect(200);
    await holder.browser.put(`/api/marks/${mark.id}/photos/${(await addPhoto(holder.id, people.knex)).id}`).send({ region: null }).expect(409);
    await holder.browser.delete(path).expect(200);
    await holder.browser.delete(path).expect(404);
  });

  test('takes it off the record, unless others have read it, even if they took that back', async () => {
    const mark = await wantedMark(people, holder, { reading: 'KPOI' });
    const read = await readBy(ben, mark, 'KPOI');
    await holder.browser.delete(`/api/marks/${mark.id}`).expect(409);
    await holder.browser.delete(`/api/parts/${String(mark.part?.id)}`).expect(409);
    await ben.browser.delete(`/api/readings/${String(read.readings[0]?.id)}`).expect(200);
    await holder.browser.delete(`/api/marks/${mark.id}`).expect(409);

    const own = await wantedMark(people, holder, { reading: 'KPOI' });
    await holder.browser.delete(`/api/marks/${own.id}`).expect(200, { done: true });
    await holder.browser.get(`/api/marks/${own.id}`).expect(404);
    await holder.browser.delete(`/api/marks/${own.id}`).expect(404);
    expect((await people.actsOf(own.id)).map(({ act }) => act)).toEqual(['mark.recorded', 'mark.removed']);
  });
});
