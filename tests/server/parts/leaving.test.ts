import { beforeAll, describe, expect, test } from 'vitest';
import { MarkPage } from '#contract/marks.ts';
import { FORMER_MEMBER } from '#db/vocabulary.ts';
import { someone } from '#tests/support/contributing.ts';
import type { SomeoneSignedIn } from '#tests/support/contributing.ts';
import { addPhoto } from '#tests/support/factories/record.ts';
import { PASSWORD, usePeople } from '#tests/support/people.ts';
import { BARE_PART, markSeenBy, readBy, recordMark, recordPart, wantedMark } from '#tests/support/recording.ts';

const people = usePeople();
let other: SomeoneSignedIn;
beforeAll(async () => {
  other = await someone(people);
});

describe('the export', () => {
  test('has one’s parts, marks, readings and photos, and nothing others read of them', async () => {
    const keeper = await someone(people);
    const mark = await wantedMark(people, keeper, { reading: 'KPOI', part: { called: 'Gear case', note: 'Behind the door', foundSerial: '3C1207' } });
    const foreign = await wantedMark(people, other, { part: { called: 'Not theirs' } });
    await readBy(keeper, foreign, 'RLKON');
    await readBy(other, mark, 'KPXX');
    const answer = await keeper.browser.get('/api/me/export').expect(200);
    expect(answer.body).toMatchObject({
      parts: [{ part: mark.part?.id, called: 'Gear case', note: 'Behind the door', foundOn: { model: null, serial: '3C1207' }, visibility: 'public', photos: [] }],
      marks: [{ mark: mark.id, kind: 'date-code', photos: [{ photo: mark.photos[0]?.photo.id, region: null, turn: 0, mirrored: false }] }],
      readings: [{ mark: mark.id, text: 'KPOI', independent: true, asHolder: true, takenBackAt: null }, { mark: foreign.id, text: 'RLKON', asHolder: false }],
      photos: [{ photo: mark.photos[0]?.photo.id, name: 'gear case.jpg', width: 640 }],
    });
    for (const secret of ['KPXX', 'Not theirs', other.displayName]) expect(answer.text).not.toContain(secret);
  });
});

describe('closing an account', () => {
  test('takes private parts along that nobody else has read, and leaves the rest under a former member', async () => {
    const keeper = await someone(people);
    const shown = await wantedMark(people, keeper, { reading: 'KPOI', part: { called: 'Shown', note: 'For me alone' } });
    const kept = await wantedMark(people, keeper, { reading: 'KPOI', part: { called: 'Kept', visibility: 'private' } });
    const readOnce = await wantedMark(people, keeper, { reading: 'KPOI', part: { called: 'Read once' } });
    await readBy(other, readOnce, 'KPOI');
    await keeper.browser.put(`/api/parts/${String(readOnce.part?.id)}`).send({ ...BARE_PART, visibility: 'private', revision: 1 }).expect(200);
    const unused = await addPhoto(keeper.id, people.knex);
    const foreign = await wantedMark(people, other, { reading: 'RLKON' });
    await readBy(keeper, foreign, 'RLKON');
    await keeper.browser.post(`/api/marks/${foreign.id}/looks`).expect(200);
    await keeper.browser.post('/api/me/close').send({ password: PASSWORD }).expect(200);

    expect(await markSeenBy({ browser: people.browser() }, shown)).toMatchObject({ reading: 'KPOI', readings: [{ by: FORMER_MEMBER }], photos: [{ photo: { name: null } }], part: { title: 'Shown' } });
    const left = async (table: string, where: object): Promise<number> => (await people.knex(table).where(where)).length;
    expect(await left('parts', { id: kept.part?.id })).toBe(0);
    expect(await left('marks', { id: kept.id })).toBe(0);
    expect(await left('marks', { id: readOnce.id })).toBe(1);
    expect(await left('parts', { note: 'For me alone' })).toBe(0);
    expect(await left('mark_looks', { memberId: keeper.id })).toBe(0);
    const photos = await people.knex('photos').where({ ownerId: keeper.id }).select('id', 'name');
    expect(photos.map(({ id }: { id: string }) => id).toSorted()).toEqual([shown, readOnce].map(({ photos: [one] }) => one?.photo.id).toSorted());
    for (const id of [unused.id, kept.photos[0]?.photo.id]) expect(await left('photos', { id })).toBe(0);
    expect(photos.every(({ name }: { name: string | null }) => name === null)).toBe(true);
    // What they read of others' marks still counts.
    const page = MarkPage.parse((await other.browser.get(`/api/marks/${foreign.id}`).expect(200)).body);
    expect(page).toMatchObject({ evidence: 'confirmed', readings: [{ by: FORMER_MEMBER, text: 'RLKON' }, { isMine: true }] });
  });

  test('lets go of a part without marks or photos as of any other', async () => {
    const keeper = await someone(people);
    const bare = await recordPart(keeper, { visibility: 'private' });
    const shown = await recordPart(keeper);
    await recordMark(keeper, bare.id);
    await keeper.browser.post('/api/me/close').send({ password: PASSWORD }).expect(200);
    await people.browser().get(`/api/parts/${shown.id}`).expect(200);
    expect(await people.knex('parts').where({ id: bare.id })).toEqual([]);
  });
});
