import { rm, stat, utimes } from 'node:fs/promises';
import { connect as openSocket } from 'node:net';
import { join } from 'node:path';
import { buffer } from 'node:stream/consumers';
import type { Knex } from 'knex';
import { afterAll, afterEach, beforeAll, expect, test, vi } from 'vitest';
import { connect } from '#db/connection.ts';
import { PictureFile } from '#db/models/picture-file.ts';
import { Picture } from '#db/models/picture.ts';
import { digestOf } from '#server/files/digest.ts';
import { fileNameOf } from '#server/files/rendition-names.ts';
import { hashPassword } from '#server/services/people/passwords.ts';
import { useDatabase } from '#tests/support/database.ts';
import { insertMember, PASSWORD } from '#tests/support/people.ts';
import { jpeg } from '#tests/support/photo-files.ts';
import { photoFolder, rowsOf } from '#tests/support/photos.ts';
import type { PhotoFolder } from '#tests/support/photos.ts';
import { startServerProcess } from '#tests/support/server-process.ts';
import type { ServerProcess } from '#tests/support/server-process.ts';

const UNTIL = { timeout: 20_000, interval: 10 };
/** Three servers are started, which is most of the time. */
const PATIENCE = 90_000;

const database = useDatabase();
let knex: Knex;
let folder: PhotoFolder;
let email: string;
let server: ServerProcess | undefined;
beforeAll(async () => {
  knex = connect(database.url, { poolSize: 2 });
  folder = await photoFolder();
  ({ email } = await insertMember(knex, await hashPassword(PASSWORD)));
  await knex('photos').delete();
  await knex('pictures').delete();
});
afterEach(async () => {
  server?.signal('SIGKILL');
  await server?.ended;
});
afterAll(async () => {
  await knex.destroy();
  await folder.remove();
});

async function start(): Promise<ServerProcess> {
  server = await startServerProcess({ DATABASE_URL: database.url, PHOTO_DIR: folder.directory, PUBLIC_ORIGIN: 'http://127.0.0.1:5080' });
  return server;
}

async function kill(): Promise<void> {
  server?.signal('SIGKILL');
  await server?.ended;
}

async function signIn(origin: string): Promise<string> {
  const response = await fetch(`${origin}/api/sign-in`, { method: 'POST', headers: { 'Content-Type': 'application/json' }, body: JSON.stringify({ email, password: PASSWORD }) });
  expect(response.status).toBe(200);
  return response.headers.getSetCookie()[0]?.split(';', 1)[0] ?? '';
}

const HEADERS = { Origin: 'http://127.0.0.1:5080' };

async function send(origin: string, cookie: string, file: Buffer): Promise<Response> {
  const body = new FormData();
  body.set('photo', new Blob([new Uint8Array(file)], { type: 'image/jpeg' }), 'block.jpg');
  return fetch(`${origin}/api/photos`, { method: 'POST', headers: { ...HEADERS, Cookie: cookie }, body });
}

test('killed in the middle of an upload and in the middle of a rendition, a server leaves nothing half there, and the next one finishes the work once', { timeout: PATIENCE }, async () => {
  const { origin } = await start();
  const cookie = await signIn(origin);
  const file = await jpeg({ width: 1_200, height: 900 });

  // A third of a file has come.
  const socket = openSocket(Number(new URL(origin).port), '127.0.0.1');
  socket.on('error', () => undefined);
  const head = ['POST /api/photos HTTP/1.1', 'Host: x', `Origin: ${HEADERS.Origin}`, `Cookie: ${cookie}`, 'Content-Type: multipart/form-data; boundary=b', `Content-Length: ${file.length + 200}`, '', ''];
  socket.write(`${head.join('\r\n')}--b\r\nContent-Disposition: form-data; name="photo"; filename="a.jpg"\r\n\r\n`);
  socket.write(file.subarray(0, Math.floor(file.length / 3)));
  await vi.waitFor(async () => {
    const [half = 'none yet'] = await folder.files();
    expect((await stat(join(folder.directory, half))).size).toBeGreaterThan(0);
  }, UNTIL);
  await kill();
  socket.destroy();
  expect(await rowsOf(knex)).toEqual({ photos: 0, pictures: 0, files: 0 });
  const [leftover = ''] = await folder.files();
  expect(leftover).toMatch(/^incoming\/work-/);
  const yesterday = new Date(Date.now() - 25 * 60 * 60 * 1_000);
  await utimes(join(folder.directory, leftover, '..'), yesterday, yesterday);

  // The next server sweeps it, and takes the whole file.
  const second = await start();
  await vi.waitFor(async () => expect(await folder.files()).toEqual([]), UNTIL);
  const sent = await send(second.origin, cookie, file);
  expect(sent.status).toBe(201);
  await vi.waitFor(async () => expect(await PictureFile.query(knex).resultSize()).toBeGreaterThan(0), UNTIL);
  await kill();
  const half = await Picture.query(knex).withGraphFetched('files').first().throwIfNotFound();
  expect(half.state).toBe('waiting');
  const before = new Map(half.files?.map((one) => [fileNameOf(one), one.digest.toString('hex')]));
  expect(before.size).toBeLessThan(8);
  // Every row stands for a whole file; the original is still there to go on from.
  const kept = async (name: string): Promise<Buffer> => buffer((await folder.store.get(`${half.storeKey}/${name}`)).stream);
  for (const [name, digest] of before) expect(digestOf(await kept(name)).toString('hex')).toBe(digest);
  expect((await kept('original')).equals(file)).toBe(true);

  // The third takes it up and finishes.
  const third = await start();
  await vi.waitFor(async () => expect((await Picture.query(knex).first().throwIfNotFound()).state).toBe('ready'), UNTIL);
  const after = await PictureFile.query(knex).where({ pictureId: half.id });
  expect(after).toHaveLength(8);
  for (const one of after) {
    const digest = digestOf(await kept(fileNameOf(one))).toString('hex');
    expect(one.digest.toString('hex')).toBe(digest);
    if (before.has(fileNameOf(one))) expect(digest).toBe(before.get(fileNameOf(one)));
  }
  await vi.waitFor(async () => expect((await folder.files()).filter((path) => !path.startsWith('incoming'))).toHaveLength(8), UNTIL);
  // Sent again, as whoever saw no answer would, it is the same photo.
  expect((await send(third.origin, cookie, file)).status).toBe(201);
  expect(await rowsOf(knex)).toEqual({ photos: 1, pictures: 1, files: 8 });
  third.signal('SIGTERM');
  expect(await third.ended).toBe(0);
  await rm(folder.workDirectory, { recursive: true, force: true });
});
