import type supertest from 'supertest';
import { v7 as uuidV7 } from 'uuid';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { z } from 'zod';
import { Photo as PhotoShown } from '#contract/photos.ts';
import { MachineModel } from '#db/models/machine-model.ts';
import { Mark } from '#db/models/mark.ts';
import { MarkPhoto } from '#db/models/mark-photo.ts';
import { PartPhoto } from '#db/models/part-photo.ts';
import { Part } from '#db/models/part.ts';
import { Photo } from '#db/models/photo.ts';
import { Picture } from '#db/models/picture.ts';
import { photoHandlings } from '#server/jobs/photo-handlings.ts';
import { addMachine, addPart } from '#tests/support/factories/record.ts';
import { usePeople } from '#tests/support/people.ts';
import { jpeg, tracesIn } from '#tests/support/photo-files.ts';
import { photoFolder, upload, usePhotoPeople } from '#tests/support/photos.ts';
import type { PhotoFolder } from '#tests/support/photos.ts';
import { problemOf } from '#tests/support/problem.ts';

let folder: PhotoFolder;
const people = usePeople(() => ({ photos: folder }));
let owner: supertest.Agent;
let ownerId: string;
let other: supertest.Agent;
let visitor: supertest.Agent;
let photo: PhotoShown;
let part: Part;
let address: string;
beforeAll(async () => {
  folder = await photoFolder();
});
afterAll(() => folder.remove());
const sessions = usePhotoPeople(people);
beforeEach(async () => {
  ({ browser: owner, memberId: ownerId } = await sessions('owner'));
  ({ browser: other } = await sessions('other'));
  await Part.query(people.knex).delete().where({ holderId: ownerId });
  await Photo.query(people.knex).delete().where({ ownerId });
  visitor = people.browser();
  photo = await addReadyPhoto();
  address = photo.renditions.thumb!.url;
  part = await addPart({ holderId: ownerId, visibility: 'private' }, people.knex);
  await PartPhoto.query(people.knex).insert({ partId: part.id, photoId: photo.id, ordinal: 0 });
});

/** Does what the job would. */
async function perform(queue: string, payload: unknown): Promise<void> {
  const handlings = photoHandlings({ knex: people.knex, photos: folder, logger: people.log.logger });
  await handlings.find(({ definition }) => definition.name === queue)!.perform(payload, { number: 1, signal: new AbortController().signal });
}

async function addReadyPhoto(): Promise<PhotoShown> {
  const response = await upload(owner, await jpeg(), { name: 'my own words.jpg' }).expect(201);
  const sent = PhotoShown.parse(response.body);
  const { pictureId } = await Photo.query(people.knex).findById(sent.id).throwIfNotFound();
  await perform('make-renditions', { pictureId });
  return PhotoShown.parse((await owner.get(`/api/photos/${sent.id}`).expect(200)).body);
}

async function share(visibility: 'public' | 'private'): Promise<void> {
  await Part.query(people.knex).findById(part.id).patch({ visibility });
}

describe('a photo', () => {
  test('whose renditions are made has them all, with addresses nobody can guess', () => {
    expect(photo).toMatchObject({ state: 'ready', width: 48, height: 32 });
    const { thumb, page, full, relief } = photo.renditions;
    const [, unguessable = ''] = /^\/photos\/([a-z0-9]{32})\//.exec(thumb?.url ?? '') ?? [];
    const at = (name: string): string => `/photos/${unguessable}/${name}`;
    expect(thumb).toEqual({ url: at('thumb-48.webp'), width: 48, height: 32, type: 'image/webp', files: [expect.objectContaining({ width: 48 })] });
    expect(page).toMatchObject({ type: 'image/webp', files: [{ url: at('page-48.avif'), type: 'image/avif' }, { url: at('page-48.webp'), type: 'image/webp' }] });
    expect([full?.url, relief?.url]).toEqual([at('full-48.webp'), at('relief-48.webp')]);
  });

  test('that is private is its owner’s alone, and the same as one that is not there', async () => {
    await owner.get(address).expect(200);
    for (const stranger of [other, visitor]) {
      const refused = await problemOf(stranger.get(address), 404);
      const absent = await problemOf(stranger.get(address.replace(/[a-z0-9]{32}/, 'z'.repeat(32))), 404);
      expect({ ...refused, requestId: '' }).toEqual({ ...absent, requestId: '' });
      await problemOf(stranger.get(`/api/photos/${photo.id}`), 404);
    }
    await problemOf(other.delete(`/api/photos/${photo.id}`), 404);
    await problemOf(visitor.delete(`/api/photos/${photo.id}`), 401);
  });

  test('that is private is no nearer for whoever has its tag', async () => {
    const { headers } = await owner.get(address).expect(200);
    expect(headers['cache-control']).toBe('private, no-cache');
    const tag = String(headers['etag']);
    expect((await owner.get(address).set('If-None-Match', tag).expect(304)).text).toBe('');
    await problemOf(visitor.get(address).set('If-None-Match', tag), 404);
    await problemOf(other.get(address).set('If-None-Match', '*'), 404);
  });

  test('of a public part is everybody’s, until it is private again', async () => {
    await share('public');
    const response = await visitor.get(address).expect(200);
    expect(response.headers).toMatchObject({ 'cache-control': 'public, max-age=300, must-revalidate', 'content-type': 'image/webp' });
    await visitor.get(address).set('If-None-Match', String(response.headers['etag'])).expect(304);
    const shown = PhotoShown.parse((await visitor.get(`/api/photos/${photo.id}`).expect(200)).body);
    expect(shown).toMatchObject({ id: photo.id, name: null });
    expect(JSON.stringify(shown)).not.toContain('my own words');
    await problemOf(other.delete(`/api/photos/${photo.id}`), 403);
    await share('private');
    await problemOf(visitor.get(address), 404);
    await owner.get(address).expect(200);
  });

  test('of a mark on a public part is everybody’s', async () => {
    await PartPhoto.query(people.knex).delete().where({ photoId: photo.id });
    await addMarkOf({ partId: part.id, machineId: null, kind: 'casting-number' });
    await problemOf(visitor.get(address), 404);
    await share('public');
    await visitor.get(address).expect(200);
  });

  test.each([
    ['other', 'public', false, 200],
    ['other', 'private', true, 404],
    ['serial', 'public', true, 200],
    ['serial', 'public', false, 404],
    ['plate', 'public', false, 404],
  ] as const)('of a mark of kind %s on a machine that is %s, its serial shown: %s, answers a visitor %i', async (kind, visibility, serialShown, status) => {
    const model = await MachineModel.query(people.knex).findOne({ slug: 'brackwater-30-crawler' }).throwIfNotFound();
    const machine = await addMachine({ modelId: model.id, serialAsStamped: '3C1207', ownerId, visibility, serialShown }, people.knex);
    await PartPhoto.query(people.knex).delete().where({ photoId: photo.id });
    await addMarkOf({ partId: null, machineId: machine.id, kind });
    expect((await visitor.get(address)).status).toBe(status);
    await owner.get(address).expect(200);
  });
});

async function addMarkOf(on: Pick<Mark, 'partId' | 'machineId' | 'kind'>): Promise<Mark> {
  const mark = await Mark.query(people.knex).insertAndFetch({ id: uuidV7(), technique: 'stamped', ...on });
  await MarkPhoto.query(people.knex).insert({ markId: mark.id, photoId: photo.id, ordinal: 0 });
  return mark;
}

describe('a file', () => {
  test('is served as what it is, and runs nothing where it is opened as a page', async () => {
    const response = await owner.get(photo.renditions.page!.files[0]!.url).buffer(true).expect(200);
    expect(response.headers).toMatchObject({
      'content-type': 'image/avif',
      'x-content-type-options': 'nosniff',
      'content-security-policy': "default-src 'none'; sandbox",
      'cross-origin-resource-policy': 'same-origin',
      vary: expect.stringContaining('Cookie') as unknown,
    });
    expect(response.headers['content-disposition']).toBeUndefined();
    expect(Number(response.headers['content-length'])).toBe(z.instanceof(Buffer).parse(response.body).length);
    expect(tracesIn(z.instanceof(Buffer).parse(response.body))).toEqual([]);
  });

  test('is told of by its head alone', async () => {
    const response = await owner.head(address).expect(200);
    expect(Number(response.headers['content-length'])).toBeGreaterThan(0);
    expect(response.headers['etag']).toMatch(/^"[0-9a-f]{64}"$/);
    await visitor.head(address).expect(404);
  });

  test.each(['original', 'thumb-49.webp', 'thumb-48.avif', 'thumb-48.webp.html', '..%2foriginal', '%2e%2e%2f%2e%2e%2fincoming', ''])('there is none like %j', async (name) => {
    await problemOf(owner.get(address.replace(/[^/]+$/, name)), 404);
  });

  test('whose bytes the store has lost is missing, and one it can’t give just now is asked for later', async () => {
    const { picture } = await Photo.query(people.knex).findById(photo.id).withGraphFetched('picture').throwIfNotFound();
    await folder.store.remove(`${picture!.storeKey}/thumb-48.webp`);
    const missing = await owner.get(address).expect(404);
    expect(missing.headers['etag']).not.toMatch(/^"[0-9a-f]{64}"$/);
    expect(missing.headers['cache-control']).toBe('no-store');
  });
});

describe('photos that stand on nothing', () => {
  test('are listed for their owner, newest first', async () => {
    const [first, second] = [await addReadyPhoto(), await addReadyPhoto()];
    const list = async (browser: supertest.Agent): Promise<readonly string[]> =>
      z.object({ items: z.array(PhotoShown) }).parse((await browser.get('/api/photos').expect(200)).body).items.map(({ id }) => id);
    expect(await list(owner)).toEqual([second.id, first.id]);
    expect(await list(other)).toEqual([]);
    await problemOf(visitor.get('/api/photos'), 401);
    await PartPhoto.query(people.knex).insert({ partId: part.id, photoId: second.id, ordinal: 1 });
    expect(await list(owner)).toEqual([first.id]);
  });
});

describe('a photo that is removed', () => {
  test('is off everything it stood on, and its files are gone; marks go by what is left to them', async () => {
    await share('public');
    const mark = await addMarkOf({ partId: part.id, machineId: null, kind: 'casting-number' });
    await Mark.query(people.knex).findById(mark.id).patch({ evidence: 'photographed' });
    const { picture } = await Photo.query(people.knex).findById(photo.id).withGraphFetched('picture').throwIfNotFound();
    await owner.delete(`/api/photos/${photo.id}`).expect(200, { done: true });
    await problemOf(owner.get(address), 404);
    await problemOf(owner.get(`/api/photos/${photo.id}`), 404);
    await problemOf(owner.delete(`/api/photos/${photo.id}`), 404);
    expect(await PartPhoto.query(people.knex).where({ photoId: photo.id }).resultSize()).toBe(0);
    expect(await Mark.query(people.knex).findById(mark.id).throwIfNotFound()).toMatchObject({ evidence: 'claimed' });
    expect(await Picture.query(people.knex).findById(picture!.id)).toBeUndefined();
    expect((await folder.files()).filter((path) => path.startsWith(picture!.storeKey))).toEqual([]);
    expect((await people.actsOf(photo.id)).map(({ act }) => act)).toEqual(['photo.added', 'photo.removed']);
  });

  test('leaves the picture to another member who has it too', async () => {
    const file = await jpeg();
    const mine = PhotoShown.parse((await upload(owner, file).expect(201)).body);
    const { pictureId } = await Photo.query(people.knex).findById(mine.id).throwIfNotFound();
    await perform('make-renditions', { pictureId });
    const theirs = PhotoShown.parse((await upload(other, file).expect(201)).body);
    expect(theirs.state).toBe('ready');
    await owner.delete(`/api/photos/${mine.id}`).expect(200);
    await other.get(theirs.renditions.thumb!.url).expect(200);
  });
});
