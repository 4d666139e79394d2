import { rm, writeFile } from 'node:fs/promises';
import { createServer, request as httpRequest } from 'node:http';
import { connect } from 'node:net';
import type { AddressInfo } from 'node:net';
import { join } from 'node:path';
import { deflateSync } from 'node:zlib';
import type supertest from 'supertest';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { Photo as PhotoShown, PHOTO_LIMITS } from '#contract/photos.ts';
import { Photo } from '#db/models/photo.ts';
import { Picture } from '#db/models/picture.ts';
import { Problem } from '#contract/problem.ts';
import { createPhotoMeans } from '#server/files/photo-means.ts';
import { startFakeBucket } from '#tests/support/fake-bucket.ts';
import { jobsOf } from '#tests/support/jobs.ts';
import { ORIGIN, usePeople } from '#tests/support/people.ts';
import { animatedWebp, bitFlipped, jpeg, jpegOfHeader, png, pngOfHeader, pngWithChunk, taggedHeic, taggedJpeg, webp } from '#tests/support/photo-files.ts';
import { photoFolder, rowsOf, upload, usePhotoPeople } from '#tests/support/photos.ts';
import type { PhotoFolder } from '#tests/support/photos.ts';
import { problemOf } from '#tests/support/problem.ts';

let folder: PhotoFolder;
const people = usePeople(() => ({ photos: folder }));
let browser: supertest.Agent;
let memberId: string;
let cookie: string;
beforeAll(async () => {
  folder = await photoFolder();
});
afterAll(() => folder.remove());
const sessions = usePhotoPeople(people);
beforeEach(async () => {
  ({ browser, memberId, cookie } = await sessions('sender'));
});

/** Checks that nothing at all is left of what the work sends. */
async function leavingNothing(work: () => Promise<void>): Promise<void> {
  const before = { rows: await rowsOf(people.knex), files: await folder.files() };
  await work();
  await expect.poll(() => folder.files(), { timeout: 5_000, interval: 20 }).toEqual(before.files);
  expect(await rowsOf(people.knex)).toEqual(before.rows);
}

describe('a photo that is sent', () => {
  test.each([
    ['jpeg', jpeg, 'block.jpg', 'image/jpeg'],
    ['png', png, 'block.PNG', 'image/png'],
    ['webp', webp, 'block.webp', 'image/webp'],
    ['jpeg', jpeg, 'no ending', ''],
  ])('as %s is put on record, its original kept and its renditions asked for', async (type, draw, name, declared) => {
    const file = await draw();
    const response = await upload(browser, file, { name, type: declared }).expect(201);
    const photo = PhotoShown.parse(response.body);
    expect(photo).toMatchObject({ state: 'waiting', failure: null, width: 48, height: 32, name, takenOn: null, renditions: { thumb: null, page: null, full: null, relief: null } });
    expect(response.headers['cache-control']).toBe('no-store');
    const row = await Photo.query(people.knex).findById(photo.id).withGraphFetched('picture').throwIfNotFound();
    expect(row).toMatchObject({ ownerId: memberId, picture: { type, bytes: String(file.length), state: 'waiting' } });
    expect(await folder.files()).toContain(`${row.picture!.storeKey}/original`);
    expect((await jobsOf('make-renditions', people.knex)).map(({ data }) => data)).toContainEqual({ pictureId: row.pictureId });
    expect((await people.actsOf(photo.id)).map(({ act, actorId }) => [act, actorId])).toEqual([['photo.added', memberId]]);
  });

  test('as HEIC is measured upright', async () => {
    const response = await upload(browser, await taggedHeic(), { name: 'IMG_0001.HEIC', type: 'image/heic', keepDate: true }).expect(201);
    expect(response.body).toMatchObject({ width: 96, height: 64, takenOn: '2024-05-17' });
  });

  test('turned has the size it is seen in', async () => {
    const response = await upload(browser, await taggedJpeg({ orientation: 6 })).expect(201);
    expect(response.body).toMatchObject({ width: 32, height: 48 });
  });

  test('keeps the camera’s day only where its owner says so', async () => {
    const said = await upload(browser, await taggedJpeg({ width: 50 }), { keepDate: true }).expect(201);
    expect(said.body).toMatchObject({ takenOn: '2024-05-17' });
    for (const keepDate of [false, undefined]) {
      const unsaid = await upload(browser, await taggedJpeg({ width: keepDate === undefined ? 51 : 52 }), keepDate === undefined ? {} : { keepDate }).expect(201);
      expect(unsaid.body).toMatchObject({ takenOn: null });
    }
  });

  test('once more answers the photo of before, and by another member makes another of the same picture', async () => {
    const file = await jpeg();
    const first = PhotoShown.parse((await upload(browser, file).expect(201)).body);
    const before = await folder.files();
    const again = await upload(browser, file, { name: 'copy.jpg' }).expect(201);
    expect(again.body).toMatchObject({ id: first.id, name: 'block.jpg' });
    const { browser: others } = await sessions('another');
    const theirs = PhotoShown.parse((await upload(others, file).expect(201)).body);
    expect(theirs.id).not.toBe(first.id);
    const rows = await Photo.query(people.knex).findByIds([first.id, theirs.id]);
    expect(new Set(rows.map(({ pictureId }) => pictureId)).size).toBe(1);
    expect(new Set(rows.map(({ address }) => address)).size).toBe(2);
    expect(await folder.files()).toEqual(before);
  });

  test('by several at once is kept once', async () => {
    const file = await jpeg();
    const answers = await Promise.all(Array.from({ length: 6 }, () => upload(browser, file)));
    expect(answers.map(({ status }) => status)).toEqual(Array.from({ length: 6 }, () => 201));
    expect(new Set(answers.map(({ body }) => PhotoShown.parse(body).id)).size).toBe(1);
    const { pictureId } = await Photo.query(people.knex).findById(PhotoShown.parse(answers[0]?.body).id).throwIfNotFound();
    const { storeKey } = await Picture.query(people.knex).findById(pictureId).throwIfNotFound();
    expect((await folder.files()).filter((path) => path.endsWith('original') && path.startsWith(storeKey))).toHaveLength(1);
    expect((await folder.files()).filter((path) => path.startsWith('incoming'))).toEqual([]);
    expect(await Picture.query(people.knex).resultSize()).toBe((await folder.files()).length);
  });

  test('whose picture failed before is tried again', async () => {
    const file = await jpeg();
    const first = PhotoShown.parse((await upload(browser, file).expect(201)).body);
    const { pictureId } = await Photo.query(people.knex).findById(first.id).throwIfNotFound();
    const failed = await Picture.query(people.knex).patchAndFetchById(pictureId, { state: 'failed', failure: 'It could not be made.' });
    await folder.store.remove(`${failed.storeKey}/original`);
    expect((await upload(browser, file).expect(201)).body).toMatchObject({ id: first.id, state: 'waiting', failure: null });
    const { storeKey } = await Picture.query(people.knex).findById(pictureId).throwIfNotFound();
    expect(await folder.files()).toContain(`${storeKey}/original`);
  });
});

describe('a name', () => {
  test.each([
    ['../../etc/passwd', 'passwd'],
    ['..%2f..%2fx', '..%2f..%2fx'],
    ['C:\\Photos\\block.jpg', 'block.jpg'],
    ['/etc/passwd', 'passwd'],
    ['con', 'con'],
    ['.htaccess', '.htaccess'],
    ['żółć é.jpg', 'żółć é.jpg'],
    ['photo\u202Egpj.jpg', 'photogpj.jpg'],
    ['a\rb\nc.jpg', 'abc.jpg'],
    [`${'n'.repeat(5_000)}.jpg`, 'n'.repeat(120)],
    ['<img src=x onerror=alert(1)>', '<img src=x onerror=alert(1)>'],
  ])('like %j is kept as text and leads nowhere', async (name, kept) => {
    const before = await folder.files();
    const response = await upload(browser, await jpeg(), { name }).expect(201);
    expect(PhotoShown.parse(response.body).name).toBe(kept);
    const added = (await folder.files()).filter((path) => !before.includes(path));
    expect(added).toEqual([expect.stringMatching(/^[a-z0-9]{32}\/original$/)]);
    expect(response.headers['content-disposition']).toBeUndefined();
  });

  test('with a NUL in it is cut of it, or refused with its form', async () => {
    const file = await jpeg();
    const response = await sendRaw(form([part('photo', file, 'a\0b.jpg')]));
    expect([201, 400]).toContain(response.status);
    if (response.status === 201) expect(response.body).toContain('"name":"ab.jpg"');
  });
});

describe('a file that is no photo for us', () => {
  test.each([
    ['nothing', () => Buffer.alloc(0), 'block.jpg', 422],
    ['SVG by the name of PNG', () => Buffer.from('<svg xmlns="http://www.w3.org/2000/svg" width="9" height="9"/>'), 'block.png', 415],
    ['SVG by its own name', () => Buffer.from('<?xml version="1.0"?><svg xmlns="http://www.w3.org/2000/svg"/>'), 'block.svg', 415],
    ['HTML by the name of JPEG', () => Buffer.from('<!doctype html><html><script>alert(1)</script></html>'), 'block.jpg', 415],
    ['a zip by the name of JPEG', () => Buffer.from('504b03040a0000000000000000000000000000000000000001000000612e747874', 'hex'), 'block.jpg', 415],
    ['EICAR by the name of JPEG', () => Buffer.from('X5O!P%@AP[4\\PZX54(P^)7CC)7}$' + 'EICAR-STANDARD-ANTIVIRUS-TEST-FILE!$H+H*'), 'block.jpg', 415],
    ['PDF', () => Buffer.from('%PDF-1.7\n1 0 obj\n<<>>\nendobj\n'), 'block.pdf', 415],
    ['GIF', () => Buffer.from('474946383961010001008000000000000000002c00000000010001000002024401003b', 'hex'), 'block.gif', 415],
    ['TIFF', () => Buffer.from('49492a0008000000000000000000', 'hex'), 'block.jpg', 415],
    ['random bytes', () => Buffer.from('a3f1'.repeat(600), 'hex'), 'block.jpg', 415],
  ])('%s is refused with the reason', async (_what, make, name, status) => {
    await leavingNothing(async () => {
      expect((await problemOf(upload(browser, make(), { name }), status)).detail).toMatch(/^The file is /);
    });
  });

  test.each([
    ['a.jpg.html', ''],
    ['block.png', ''],
    ['block.jpg', 'image/png'],
    ['block.jpg', 'text/html'],
  ])('a JPEG that is called %s and declared %j is refused with the reason', async (name, type) => {
    const file = await jpeg();
    await leavingNothing(async () => {
      expect((await problemOf(upload(browser, file, { name, type }), 415)).detail).toMatch(/^The file is JPEG, but /);
    });
  });

  test('50,000 × 50,000 pixels are refused by the header, at once', async () => {
    await leavingNothing(async () => {
      const began = performance.now();
      expect((await problemOf(upload(browser, pngOfHeader(50_000, 50_000), { name: 'block.png' }), 422)).detail).toContain('50000 × 50000');
      expect(performance.now() - began).toBeLessThan(1_000);
    });
  });

  test('64 megapixels by the header are not too many, and one row more is', async () => {
    await leavingNothing(async () => {
      // Whole it is not: the header passed, and decoding found the pixels missing.
      expect((await problemOf(upload(browser, pngOfHeader(8_000, 8_000), { name: 'block.png' }), 422)).detail).toMatch(/cut short/);
      expect((await problemOf(upload(browser, pngOfHeader(8_000, 8_001), { name: 'block.png' }), 422)).detail).toMatch(/64 million/);
    });
  });

  test('a JPEG whose header says it is larger than any is refused by it', async () => {
    const file = await jpeg();
    await leavingNothing(async () => {
      expect((await problemOf(upload(browser, jpegOfHeader(file, 65_500, 65_500)), 422)).detail).toContain('65500 × 65500');
      // More than the decoder knows of.
      await problemOf(upload(browser, jpegOfHeader(file, 65_535, 65_535)), 422);
      expect((await problemOf(upload(browser, jpegOfHeader(file, 65_500, 32)), 422)).detail).toMatch(/cut short/);
    });
  });

  test.each([
    ['JPEG', jpeg, 'block.jpg'],
    ['PNG', png, 'block.png'],
    ['WebP', webp, 'block.webp'],
    ['HEIC', taggedHeic, 'block.heic'],
  ])('%s that was cut short is refused with the reason', async (title, draw, name) => {
    const file = await draw();
    await leavingNothing(async () => {
      for (const share of [0.6, 0.9]) {
        const { detail } = await problemOf(upload(browser, file.subarray(0, Math.floor(file.length * share)), { name }), 422);
        expect(detail).toBe(`The file is ${title}, but damaged or cut short.`);
      }
    });
  });

  test.each([
    ['JPEG', () => jpeg({ width: 400, height: 300 }), 'block.jpg'],
    ['PNG', () => png({ width: 400, height: 300 }), 'block.png'],
  ])('%s with bits turned over is refused with the reason', async (title, draw, name) => {
    const file = bitFlipped(await draw());
    await leavingNothing(async () => {
      expect((await problemOf(upload(browser, file, { name }), 422)).detail).toBe(`The file is ${title}, but damaged or cut short.`);
    });
  });

  test('HEIC with a broken directory is refused with the reason', async () => {
    const file = Buffer.from(await taggedHeic());
    file.fill(0xff, file.indexOf('iinf') + 4, file.indexOf('iinf') + 40);
    await leavingNothing(async () => {
      expect((await problemOf(upload(browser, file, { name: 'block.heic' }), 422)).detail).toMatch(/^The file is HEIC, but damaged/);
    });
  });

  test('ten thousand frames of WebP are refused by the header', async () => {
    const file = await animatedWebp(10_000);
    await leavingNothing(async () => {
      expect((await problemOf(upload(browser, file, { name: 'block.webp' }), 422)).detail).toBe('The file is an animation. Send a still picture.');
    });
  });

  test.each([
    ['text', 'zTXt'],
    ['a colour profile', 'iCCP'],
  ])('a bomb of %s in a PNG takes no memory and does no harm', async (_what, chunk) => {
    const bomb = Buffer.concat([Buffer.from('Comment\0\0', 'latin1'), deflateSync(Buffer.alloc(100 * 1024 * 1024), { level: 9 })]);
    const before = process.memoryUsage().rss;
    const { status } = await upload(browser, pngWithChunk(await png(), chunk, bomb), { name: 'block.png' });
    expect([201, 422]).toContain(status);
    expect(process.memoryUsage().rss - before).toBeLessThan(150 * 1024 * 1024);
  });
});

describe('who may send', () => {
  test('members, and nobody else’s page in their name', async () => {
    const file = await jpeg();
    await leavingNothing(async () => {
      await problemOf(upload(people.browser(), file), 401);
      await problemOf(upload(browser, file).set('Origin', 'https://elsewhere.example'), 403);
      await problemOf(upload(browser, file).set('Sec-Fetch-Site', 'cross-site'), 403);
    });
  });

  test('whoever has room left: of many at once for the last place, one is taken', async () => {
    const { each } = PHOTO_LIMITS;
    ({ browser, memberId, cookie } = await sessions('one with many'));
    await addPhotos(each.photos - 1, 1);
    const files = await Promise.all(Array.from({ length: 8 }, () => jpeg()));
    const statuses = await Promise.all(files.map(async (file) => (await upload(browser, file)).status));
    expect(statuses.sort()).toEqual([201, ...Array.from({ length: 7 }, () => 413)]);
    await leavingNothing(async () => {
      expect((await problemOf(upload(browser, await jpeg()), 413)).detail).toMatch(/2000 photos/);
    });
  });

  test('whose photos come to no more bytes than one member may have', async () => {
    const file = await jpeg();
    ({ browser, memberId, cookie } = await sessions('one with large ones'));
    const full = PHOTO_LIMITS.each.bytes - file.length;
    await addPhotos(1, full + 1);
    await leavingNothing(async () => {
      expect((await problemOf(upload(browser, file), 413)).detail).toMatch(/10\.0 GiB/);
    });
    await people.knex('pictures').where({ bytes: full + 1 }).update({ bytes: full });
    await upload(browser, file).expect(201);
  });
});

describe('a form', () => {
  const LIMIT = PHOTO_LIMITS.file;

  test('with a file of 25 MB is taken, and with one byte more is not', async () => {
    const head = await jpeg();
    const padded = (bytes: number): Buffer => Buffer.concat([head, Buffer.alloc(bytes - head.length)]);
    await upload(browser, padded(LIMIT)).expect(201);
    await leavingNothing(async () => {
      expect((await problemOf(upload(browser, padded(LIMIT + 1)), 413)).detail).toContain('25 MB');
    });
  });

  test.each<[string, () => Promise<Buffer>, number]>([
    ['500 parts', async () => form([...manyFields(499), part('photo', await jpeg(), 'a.jpg')]), 413],
    ['11 fields', async () => form([...manyFields(11), part('photo', await jpeg(), 'a.jpg')]), 413],
    ['10 fields, of which none is known,', async () => form([...manyFields(10), part('photo', await jpeg(), 'a.jpg')]), 422],
    ['two files', async () => form([part('photo', await jpeg(), 'a.jpg'), part('photo', await jpeg(), 'b.jpg')]), 413],
    ['a file in another field', async () => form([part('picture', await jpeg(), 'a.jpg')]), 400],
    ['no file', () => Promise.resolve(form([field('keepDate', 'true')])), 400],
    ['a file without a name', async () => form([part('photo', await jpeg(), '')]), 400],
    ['a field that is too long', async () => form([field('keepDate', 'x'.repeat(16 * 1024 + 1)), part('photo', await jpeg(), 'a.jpg')]), 413],
    ['a field as long as may be', async () => form([field('keepDate', 'x'.repeat(16 * 1024)), part('photo', await jpeg(), 'a.jpg')]), 422],
    ['a name of 101 characters', async () => form([field('n'.repeat(101), 'x'), part('photo', await jpeg(), 'a.jpg')]), 400],
    ['a name of 100 characters', async () => form([field('n'.repeat(100), 'x'), part('photo', await jpeg(), 'a.jpg')]), 422],
    ['a name nested 50 deep', async () => form([field(`a${'[b]'.repeat(50)}`, 'x'), part('photo', await jpeg(), 'a.jpg')]), 400],
    ['a name that counts to a thousand million', async () => form([field('a[1000000000]', 'x'), part('photo', await jpeg(), 'a.jpg')]), 400],
    ['a name that reaches for the prototype', async () => form([field('__proto__[isAdmin]', 'x'), part('photo', await jpeg(), 'a.jpg')]), 422],
    ['a choice that is none', async () => form([field('keepDate', 'perhaps'), part('photo', await jpeg(), 'a.jpg')]), 422],
    ['a choice made twice', async () => form([field('keepDate', 'true'), field('keepDate', 'false'), part('photo', await jpeg(), 'a.jpg')]), 422],
    ['no field’s name', async () => form([Buffer.from('Content-Disposition: form-data\r\n\r\nx'), part('photo', await jpeg(), 'a.jpg')]), 400],
    ['garbage', () => Promise.resolve(Buffer.from('a3f1'.repeat(100), 'hex')), 400],
    ['nothing in it', () => Promise.resolve(Buffer.alloc(0)), 400],
    ['no end', async () => form([part('photo', await jpeg(), 'a.jpg')]).subarray(0, -8), 400],
    ['half a boundary', async () => form([part('photo', await jpeg(), 'a.jpg')]).subarray(0, 9), 400],
    ['half a file', async () => form([part('photo', await jpeg(), 'a.jpg')]).subarray(0, 400), 400],
    ['a broken head of a part', () => Promise.resolve(form([Buffer.from('Content-Disposition form-data; name="photo"\r\n\r\nx')])), 400],
  ])('with %s is answered with the reason', async (_what, make, status) => {
    const body = await make();
    await leavingNothing(async () => {
      const answer = await sendRaw(body);
      expect(answer.status, answer.body).toBe(status);
      expect(answer.body).toContain('"detail":');
    });
  });

  test.each([
    ['application/json', 415],
    ['text/plain', 415],
    ['application/x-www-form-urlencoded', 415],
    ['multipart/form-data', 400],
    ['multipart/mixed; boundary=cut', 415],
  ])('declared as %s is refused', async (type, status) => {
    const body = form([part('photo', await jpeg(), 'a.jpg')]);
    await leavingNothing(async () => {
      expect((await sendRaw(body, { type })).status).toBe(status);
    });
  });

  test('that breaks off anywhere leaves nothing, and the server goes on', async () => {
    const body = form([field('keepDate', 'true'), part('photo', await jpeg({ width: 200, height: 200 }), 'a.jpg')]);
    await leavingNothing(async () => {
      await onServer(async (port) => {
        for (let at = 0; at < body.length; at += 1_024) await breakOff(port, body, at);
      });
    });
    await upload(browser, await jpeg()).expect(201);
  });

  test.each([true, false])('of a gigabyte is cut early, said beforehand: %s', async (isSaid) => {
    await leavingNothing(async () => {
      await onServer(async (port) => {
        const { status, written } = await pour(port, isSaid);
        expect(status).toBe(413);
        expect(written).toBeLessThan(isSaid ? 16 * 1024 ** 2 : LIMIT + 40 * 1024 ** 2);
      });
    });
  });

  test('of a gigabyte by nobody is cut before a byte of it is kept', async () => {
    await leavingNothing(async () => {
      await onServer(async (port) => {
        const { status, written } = await pour(port, false, '');
        expect(status).toBe(401);
        expect(written).toBeLessThan(16 * 1024 ** 2);
      });
    });
  });
});

describe('a store that takes nothing', () => {
  test.each([
    ['is-full', 507, /^The register can keep no more photos/],
    ['denies', 503, /^The photo store does not answer/],
    ['fails', 503, /^The photo store does not answer/],
  ] as const)('as it %s is answered with %i, and nothing is left', async (mischief, status, detail) => {
    const bucket = await startFakeBucket();
    bucket.misbehave(mischief);
    try {
      const app = people.anotherApp({ photos: createPhotoMeans({ directory: folder.directory, bucket: bucket.settings }) });
      const sender = people.browser({ app }).set('Cookie', cookie);
      const file = await jpeg();
      await leavingNothing(async () => {
        const answer = await upload(sender, file);
        expect(answer.status).toBe(status);
        expect(Problem.parse(answer.body).detail).toMatch(detail);
      });
      expect(bucket.files.size).toBe(0);
      expect(people.log.takeErrors()).not.toEqual([]);
      bucket.misbehave(undefined);
      await upload(sender, file).expect(201);
      expect(bucket.files.size).toBe(1);
    } finally {
      await bucket.stop();
    }
  });

  test('as there is no folder to receive in is answered with 503', async () => {
    const directory = join(folder.directory, 'a-file');
    await writeFile(directory, '');
    const app = people.anotherApp({ photos: createPhotoMeans({ directory, bucket: undefined }) });
    const file = await jpeg();
    await leavingNothing(async () => {
      await problemOf(upload(people.browser({ app }).set('Cookie', cookie), file), 503);
    });
    expect(people.log.takeErrors()).not.toEqual([]);
    await rm(directory);
  });
});

const BOUNDARY = 'cut-here';

function form(parts: readonly Buffer[]): Buffer {
  return Buffer.concat([...parts.flatMap((one) => [Buffer.from(`--${BOUNDARY}\r\n`), one, Buffer.from('\r\n')]), Buffer.from(`--${BOUNDARY}--\r\n`)]);
}

function part(name: string, content: Buffer, filename: string): Buffer {
  return Buffer.concat([Buffer.from(`Content-Disposition: form-data; name="${name}"; filename="${filename}"\r\nContent-Type: image/jpeg\r\n\r\n`), content]);
}

function field(name: string, value: string): Buffer {
  return Buffer.from(`Content-Disposition: form-data; name="${name}"\r\n\r\n${value}`);
}

function manyFields(count: number): readonly Buffer[] {
  return Array.from({ length: count }, (_one, place) => field(`f${place}`, 'x'));
}

/** Sends bytes as they are. */
async function sendRaw(body: Buffer, { type = `multipart/form-data; boundary=${BOUNDARY}` } = {}): Promise<{ status: number; body: string }> {
  const response = await browser.post('/api/photos').set('Content-Type', type).serialize(() => body as unknown as string).send(body);
  return { status: response.status, body: response.text };
}

async function onServer(work: (port: number) => Promise<void>): Promise<void> {
  const server = createServer(people.app);
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  try {
    await work((server.address() as AddressInfo).port);
  } finally {
    server.close();
  }
}

/** Sends so many bytes of a form that was to be longer, and goes away. */
async function breakOff(port: number, body: Buffer, bytes: number): Promise<void> {
  const socket = connect(port, '127.0.0.1');
  socket.on('error', () => undefined);
  const head = [
    'POST /api/photos HTTP/1.1', 'Host: 127.0.0.1', `Origin: ${ORIGIN}`, `Cookie: ${cookie}`, `Content-Type: multipart/form-data; boundary=${BOUNDARY}`,
    `Content-Length: ${body.length}`, '', '',
  ];
  await new Promise<void>((resolve) => {
    socket.write(Buffer.concat([Buffer.from(head.join('\r\n')), body.subarray(0, bytes)]), () => resolve());
  });
  socket.destroy();
}

/** Pours a gigabyte until it is answered, or cut. */
async function pour(port: number, isSaid: boolean, session = cookie): Promise<{ status: number; written: number }> {
  const GIGABYTE = 1024 ** 3;
  const chunk = Buffer.alloc(256 * 1024);
  return new Promise((resolve, reject) => {
    const headers = { Origin: ORIGIN, 'Content-Type': `multipart/form-data; boundary=${BOUNDARY}`, ...(session === '' ? {} : { Cookie: session }), ...(isSaid ? { 'Content-Length': GIGABYTE } : {}) };
    const sending = httpRequest({ port, host: '127.0.0.1', path: '/api/photos', method: 'POST', headers });
    let status = 0;
    sending.on('response', (response) => {
      status = response.statusCode ?? 0;
      response.resume();
    });
    sending.on('error', () => undefined);
    sending.on('close', () => {
      if (status === 0) reject(new Error('Cut without an answer'));
      else resolve({ status, written: sending.socket?.bytesWritten ?? 0 });
    });
    sending.write(Buffer.concat([Buffer.from(`--${BOUNDARY}\r\n`), part('photo', Buffer.alloc(0), 'a.jpg')]));
    const more = (): void => {
      let goesOn = true;
      while (goesOn && !sending.destroyed && status === 0) goesOn = sending.write(chunk);
    };
    sending.on('drain', more);
    more();
  });
}

/** Puts photos of the member on record whose bytes were never sent. */
async function addPhotos(count: number, bytes: number): Promise<void> {
  await people.knex.raw(
    `with made as (
       insert into pictures (id, digest, store_key, type, bytes, width, height, state)
       select gen_random_uuid(), sha256(random()::text::bytea), md5(random()::text), 'jpeg', ?, 1, 1, 'ready' from generate_series(1, ?) returning id
     )
     insert into photos (id, owner_id, picture_id, address) select gen_random_uuid(), ?, id, md5(random()::text) from made`,
    [bytes, count, memberId],
  );
}
