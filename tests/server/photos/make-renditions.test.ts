import { randomUUID } from 'node:crypto';
import { mkdir, utimes, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { buffer } from 'node:stream/consumers';
import type { Knex } from 'knex';
import type supertest from 'supertest';
import { v7 as uuidV7 } from 'uuid';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, test, vi } from 'vitest';
import { Photo as PhotoShown } from '#contract/photos.ts';
import { connect } from '#db/connection.ts';
import { AuditRow } from '#db/models/audit-row.ts';
import { PartPhoto } from '#db/models/part-photo.ts';
import { Photo } from '#db/models/photo.ts';
import { PictureFile } from '#db/models/picture-file.ts';
import { Picture } from '#db/models/picture.ts';
import { createBucketStore } from '#server/files/bucket-store.ts';
import { digestOf } from '#server/files/digest.ts';
import type { PhotoStore } from '#server/files/photo-store.ts';
import { fileNameOf } from '#server/files/rendition-names.ts';
import { photoHandlings } from '#server/jobs/photo-handlings.ts';
import { takeUpRenditions } from '#server/jobs/take-up-renditions.ts';
import { startJobRunner } from '#server/queue/job-runner.ts';
import { failPicture } from '#server/services/photos/fail-picture.ts';
import { makeRenditions } from '#server/services/photos/make-renditions.ts';
import { resumeRenditions } from '#server/services/photos/resume-renditions.ts';
import { sweepPhotos } from '#server/services/photos/sweep-photos.ts';
import { startFakeBucket } from '#tests/support/fake-bucket.ts';
import type { FakeBucket } from '#tests/support/fake-bucket.ts';
import { addPart } from '#tests/support/factories/record.ts';
import { clearJobs, jobsOf } from '#tests/support/jobs.ts';
import { keptLog } from '#tests/support/log.ts';
import { usePeople } from '#tests/support/people.ts';
import { bitFlipped, jpeg, png, pngWithChunk, taggedHeic, taggedJpeg, tracesIn } from '#tests/support/photo-files.ts';
import { photoFolder, upload, usePhotoPeople } from '#tests/support/photos.ts';
import type { PhotoFolder } from '#tests/support/photos.ts';

const ALL = ['full-48.webp', 'page-48.avif', 'page-48.webp', 'relief-48.webp', 'thumb-48.webp'];
const DAY = 24 * 60 * 60 * 1_000;

let folder: PhotoFolder;
let bucket: FakeBucket;
const people = usePeople(() => ({ photos: folder }));
const sessions = usePhotoPeople(people);
let browser: supertest.Agent;
let knex: Knex;
beforeAll(async () => {
  folder = await photoFolder();
  bucket = await startFakeBucket();
});
afterAll(async () => {
  await folder.remove();
  await bucket.stop();
});
beforeEach(async () => {
  ({ knex } = people);
  ({ browser } = await sessions('sender'));
});
afterEach(async () => {
  bucket.misbehave(undefined);
  await knex('photos').delete();
  await knex('pictures').delete();
  await clearJobs(knex);
});

const never = new AbortController().signal;

async function send(file: Buffer, name = 'block.jpg'): Promise<Picture> {
  const { id } = PhotoShown.parse((await upload(browser, file, { name }).expect(201)).body);
  return (await Photo.query(knex).findById(id).withGraphFetched('picture').throwIfNotFound()).picture!;
}

async function run(picture: Picture, { store = folder.store, signal = never }: { store?: PhotoStore; signal?: AbortSignal } = {}): Promise<Picture> {
  await makeRenditions(picture.id, { ...folder, store, knex, signal });
  return reload(picture);
}

async function reload({ id }: Picture): Promise<Picture> {
  return Picture.query(knex).findById(id).withGraphFetched('files').throwIfNotFound();
}

async function filesOf({ storeKey }: Picture): Promise<readonly string[]> {
  return (await folder.files()).filter((path) => path.startsWith(storeKey)).map((path) => path.slice(33));
}

async function bytesOf(key: string): Promise<Buffer> {
  return buffer((await folder.store.get(key)).stream);
}

/** A picture that can’t be decoded, on record as though it had passed. */
async function addBroken(): Promise<Picture> {
  const file = bitFlipped(await jpeg({ width: 400, height: 300 }));
  const storeKey = randomUUID().replaceAll('-', '');
  await folder.store.put(`${storeKey}/original`, file, { sha256: digestOf(file) });
  return Picture.query(knex).insertAndFetch({ id: uuidV7(), digest: digestOf(file), storeKey, type: 'jpeg', bytes: String(file.length), width: 400, height: 300, state: 'waiting', failure: null });
}

/** A store that does as another, but for what is said otherwise. */
function storeBut(otherwise: Partial<PhotoStore>): PhotoStore {
  return { ...folder.store, ...otherwise };
}

describe('the renditions of a picture', () => {
  test('are made, each with its row, the thumb first; the original goes', async () => {
    const sent = await send(await jpeg());
    const order: string[] = [];
    const store = storeBut({ put: (key, ...rest) => (order.push(key.slice(33)), folder.store.put(key, ...rest)) });
    const made = await run(sent, { store });
    expect(order).toEqual(['thumb-48.webp', 'page-48.webp', 'page-48.avif', 'full-48.webp', 'relief-48.webp']);
    expect(made.state).toBe('ready');
    expect(await filesOf(made)).toEqual(ALL);
    expect(made.files?.map(fileNameOf).sort()).toEqual(ALL);
    for (const file of made.files ?? []) {
      const bytes = await bytesOf(`${made.storeKey}/${fileNameOf(file)}`);
      expect(file).toMatchObject({ bytes: String(bytes.length), digest: digestOf(bytes), height: 32 });
    }
    expect(await folder.files()).not.toContainEqual(expect.stringMatching(/^incoming/));
  });

  test.each<[string, () => Promise<Buffer>, string]>([
    ['a JPEG with GPS and XMP', () => taggedJpeg(), 'a.jpg'],
    ['a JPEG with a page behind it', async () => Buffer.concat([await jpeg(), Buffer.from('<html><script>alert(1)</script></html>')]), 'a.jpg'],
    ['a JPEG with an archive behind it', async () => Buffer.concat([await jpeg(), Buffer.from('504b0304140000000000', 'hex'), Buffer.alloc(60)]), 'a.jpg'],
    ['a JPEG with a film behind it', async () => Buffer.concat([await jpeg(), Buffer.from('\0\0\0\u0018ftypisom\0\0\0\0isommp42', 'latin1')]), 'a.jpg'],
    ['a PNG with a program in it', async () => pngWithChunk(await png(), 'tEXt', Buffer.from('Comment\0<?php system($_GET[0]); ?>', 'latin1')), 'a.png'],
    ['HEIC with GPS', taggedHeic, 'a.heic'],
  ])('of %s hold nothing but the picture, in any file that is kept', async (_what, make, name) => {
    const file = await make();
    expect(tracesIn(file)).not.toEqual([]);
    const made = await run(await send(file, name));
    expect(made.state).toBe('ready');
    expect(await filesOf(made)).toHaveLength(5);
    for (const kept of await filesOf(made)) expect(tracesIn(await bytesOf(`${made.storeKey}/${kept}`)), kept).toEqual([]);
  });

  test('are shown as far as they are made', async () => {
    const sent = await send(await jpeg());
    const stopping = new AbortController();
    const store = storeBut({
      put: async (key, ...rest) => {
        await folder.store.put(key, ...rest);
        stopping.abort();
      },
    });
    await expect(run(sent, { store, signal: stopping.signal })).rejects.toThrow();
    const { id } = await Photo.query(knex).findOne({ pictureId: sent.id }).throwIfNotFound();
    const shown = PhotoShown.parse((await browser.get(`/api/photos/${id}`).expect(200)).body);
    expect(shown).toMatchObject({ state: 'waiting', renditions: { thumb: { width: 48 }, page: null, full: null, relief: null } });
    await browser.get(shown.renditions.thumb!.url).expect(200);
    const written: string[] = [];
    const again = await run(sent, { store: storeBut({ put: (key, ...rest) => (written.push(key), folder.store.put(key, ...rest)) }) });
    expect(again.state).toBe('ready');
    expect(written).toHaveLength(ALL.length - 1);
  });

  test('are made once, whoever asks again', async () => {
    const sent = await send(await jpeg());
    await Promise.all([run(sent), run(sent)]);
    const before = await PictureFile.query(knex).where({ pictureId: sent.id });
    const untouched = storeBut({ put: () => Promise.reject(new Error('nothing is to be kept')) });
    expect(await run(sent, { store: untouched })).toMatchObject({ state: 'ready' });
    expect(await PictureFile.query(knex).where({ pictureId: sent.id })).toEqual(before);
    await expect(makeRenditions(uuidV7(), { ...folder, knex, signal: never })).resolves.toBeUndefined();
  });

  test('of what can’t be decoded fail for good, with the reason, and the original goes', async () => {
    const failed = await run(await addBroken());
    expect(failed).toMatchObject({ state: 'failed', failure: 'The file is damaged, or too hard to open.' });
    expect(await filesOf(failed)).not.toContain('original');
  });

  test('wait while the store is away, and are given up in the end', async () => {
    const sent = await send(await jpeg());
    bucket.misbehave('denies');
    const away = createBucketStore(bucket.settings);
    await expect(run(sent, { store: away })).rejects.toMatchObject({ fault: 'away' });
    expect((await reload(sent)).state).toBe('waiting');
    await failPicture(sent.id, 'It could not be made.', { ...folder, knex });
    expect(await reload(sent)).toMatchObject({ state: 'failed', failure: 'It could not be made.' });
    expect(await filesOf(sent)).toEqual([]);
    await failPicture(sent.id, 'Once more.', { ...folder, knex });
    expect((await reload(sent)).failure).toBe('It could not be made.');
  });

  test('are not made of bytes that changed in the store', async () => {
    const sent = await send(await jpeg());
    const other = await jpeg();
    await folder.store.put(`${sent.storeKey}/original`, other, { sha256: digestOf(other) });
    await expect(run(sent)).rejects.toMatchObject({ fault: 'corrupt' });
    expect((await reload(sent)).files).toEqual([]);
  });

  test('leave nothing behind where the photo is removed meanwhile', async () => {
    const sent = await send(await jpeg());
    const { id } = await Photo.query(knex).findOne({ pictureId: sent.id }).throwIfNotFound();
    const store = storeBut({
      put: async (key, ...rest) => {
        if (key.includes('thumb')) await browser.delete(`/api/photos/${id}`).expect(200);
        await folder.store.put(key, ...rest);
      },
    });
    await makeRenditions(sent.id, { ...folder, store, knex, signal: never });
    expect(await Picture.query(knex).findById(sent.id)).toBeUndefined();
    expect(await filesOf(sent)).toEqual([]);
  });

  test('stand in a bucket as they do in a folder', async () => {
    const file = await jpeg();
    const sent = await send(file);
    bucket.files.set(`${sent.storeKey}/original`, file);
    const made = await run(sent, { store: createBucketStore(bucket.settings) });
    expect(made.state).toBe('ready');
    expect([...bucket.files.keys()].sort()).toEqual(ALL.map((name) => `${made.storeKey}/${name}`));
    bucket.files.clear();
  });
});

describe('a server that starts', () => {
  test('takes up what waits, and its jobs finish it', async () => {
    const [lost, other] = [await send(await jpeg()), await send(await png(), 'b.png')];
    await clearJobs(knex);
    const log = keptLog();
    await takeUpRenditions({ knex, logger: log.logger, signal: never });
    expect((await jobsOf('make-renditions', knex)).map(({ data }) => data)).toEqual(expect.arrayContaining([lost, other].map(({ id }) => ({ pictureId: id }))));
    const runner = startJobRunner({ url: people.url, handlings: photoHandlings({ knex, photos: folder, logger: log.logger }), logger: log.logger, pollEvery: 20 });
    try {
      await vi.waitFor(async () => expect([(await reload(lost)).state, (await reload(other)).state]).toEqual(['ready', 'ready']), { timeout: 20_000, interval: 20 });
    } finally {
      await runner.stop();
    }
    expect(await resumeRenditions(knex)).toBe(0);
    expect(log.takeErrors()).toEqual([]);
  });

  test('does not wait for ever for a database that is away', async () => {
    const stopping = new AbortController();
    const log = keptLog();
    const away = takeUpRenditions({ knex: connect('postgres://nobody@127.0.0.1:1/none'), logger: log.logger, signal: stopping.signal });
    await vi.waitFor(() => expect(log.text()).toContain('could not be taken up yet'));
    stopping.abort();
    await away;
  });
});

describe('a sweep', () => {
  async function sweep(): Promise<unknown> {
    return sweepPhotos({ ...folder, knex, signal: never, now: new Date() });
  }

  async function age(path: string): Promise<void> {
    const then = new Date(Date.now() - DAY - 60_000);
    await utimes(join(folder.directory, path), then, then);
  }

  beforeEach(async () => {
    for (const path of await folder.files()) await folder.store.remove(path).catch(() => undefined);
  });

  test('takes photos that have stood on nothing for thirty days, and no others', async () => {
    const [old, young, used] = [await send(await jpeg()), await send(await jpeg()), await send(await jpeg())];
    for (const { id } of [old, used]) await knex('photos').where({ pictureId: id }).update({ addedAt: knex.raw(`now() - interval '30 days 1 minute'`) });
    await knex('photos').where({ pictureId: young.id }).update({ addedAt: knex.raw(`now() - interval '29 days 23 hours'`) });
    const part = await addPart({ visibility: 'private' }, knex);
    const { id: usedId } = await Photo.query(knex).findOne({ pictureId: used.id }).throwIfNotFound();
    await PartPhoto.query(knex).insert({ partId: part.id, photoId: usedId, ordinal: 0 });
    const { id: oldId } = await Photo.query(knex).findOne({ pictureId: old.id }).throwIfNotFound();
    expect(await sweep()).toEqual({ photos: 1, pictures: 1, files: 0, leftovers: 0 });
    expect((await Photo.query(knex)).map(({ pictureId }) => pictureId).sort()).toEqual([young.id, used.id].sort());
    expect(await filesOf(old)).toEqual([]);
    expect(await filesOf(young)).toEqual(['original']);
    expect(await AuditRow.query(knex).where({ subjectId: oldId }).orderBy('at')).toMatchObject([{ act: 'photo.added' }, { act: 'photo.removed', actorId: null }]);
  });

  test('takes old files without a row, and the original that was left of a ready picture; what is new is let be', async () => {
    const made = await run(await send(await jpeg()));
    const stray = 'f'.repeat(32);
    for (const key of [`${made.storeKey}/original`, `${made.storeKey}/page-7.webp`, `${stray}/original`, `${stray}/thumb-9.webp`]) {
      await folder.store.put(key, Buffer.from(key), { sha256: digestOf(Buffer.from(key)) });
    }
    expect(await sweep()).toMatchObject({ files: 0 });
    for (const path of await folder.files()) if (!path.endsWith('thumb-9.webp')) await age(path);
    expect(await sweep()).toMatchObject({ files: 3 });
    expect(await filesOf(made)).toEqual(ALL);
    expect((await folder.files()).filter((path) => path.startsWith(stray))).toEqual([`${stray}/thumb-9.webp`]);
  });

  test('lets the original of a picture that waits be, however old', async () => {
    const sent = await send(await jpeg());
    await age(`${sent.storeKey}/original`);
    expect(await sweep()).toEqual({ photos: 0, pictures: 0, files: 0, leftovers: 0 });
    expect(await filesOf(sent)).toEqual(['original']);
  });

  test('takes what a killed server left where it received and worked', async () => {
    await mkdir(join(folder.workDirectory, 'work-old'), { recursive: true });
    await writeFile(join(folder.workDirectory, 'work-old', 'half'), 'half a file');
    await writeFile(join(folder.workDirectory, 'draft'), 'half');
    await writeFile(join(folder.workDirectory, 'new-draft'), 'half');
    for (const path of ['incoming/work-old', 'incoming/draft']) await age(path);
    expect(await sweep()).toMatchObject({ leftovers: 2 });
    expect((await folder.files()).filter((path) => path.startsWith('incoming'))).toEqual(['incoming/new-draft']);
  });
});
