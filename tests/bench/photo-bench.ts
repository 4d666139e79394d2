import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { createServer } from 'node:http';
import type { Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import type { Knex } from 'knex';
import sharp from 'sharp';
import { connect } from '#db/connection.ts';
import { PictureFile } from '#db/models/picture-file.ts';
import { Picture } from '#db/models/picture.ts';
import { createPhotoMeans } from '#server/files/photo-means.ts';
import type { PhotoMeans } from '#server/files/photo-means.ts';
import { makeRendition, planRenditions } from '#server/files/renditions.ts';
import { photoHandlings } from '#server/jobs/photo-handlings.ts';
import { startJobRunner } from '#server/queue/job-runner.ts';
import { hashPassword } from '#server/services/people/passwords.ts';
import { appOver } from '#tests/support/app.ts';
import { keptLog } from '#tests/support/log.ts';
import { insertMember, ORIGIN, PASSWORD } from '#tests/support/people.ts';
import { createDemoDatabase, dropDatabases, testRun, urlOf } from '#tests/support/test-databases.ts';
import { printTable } from './print-table.ts';

const USUAL_COUNT = 200;
/** 12 megapixels. */
const SIZE = { width: 4_000, height: 3_000 } as const;
/** Pictures worked on at once, as the server does. */
const AT_ONCE = 2;
/** Uploads at once, as a page sends them. */
const SENT_AT_ONCE = 2;
/** Milliseconds between two looks at memory, and at the record. */
const LOOK = 100;

/**
 * Photos sent over HTTP and their renditions made by jobs, beside the image library alone making the same renditions of the same files, as many at
 * once: seconds, their ratio, and the most memory the process had.
 *
 * @param count of photos; fewer where less will do
 */
export async function benchPhotos(count = USUAL_COUNT): Promise<void> {
  const directory = await mkdtemp(join(tmpdir(), 'pourbook-bench-'));
  try {
    const paths = await drawPhotos(count, directory);
    const alone = await measured(() => byLibraryAlone(paths));
    const whole = await measured(() => throughServer(paths, join(directory, 'photos')));
    printTable(
      `${count} photos of 12 megapixels, ${AT_ONCE} at once`,
      ['', 's', 'photos a second', 'of the library alone', 'most memory, MB'],
      [
        row('the library alone', alone, count, alone.seconds),
        row('upload and renditions', whole, count, alone.seconds),
      ],
    );
  } finally {
    await rm(directory, { recursive: true, force: true });
  }
}

type Measured = { readonly seconds: number; readonly memory: number };

function row(title: string, { seconds, memory }: Measured, count: number, base: number): readonly string[] {
  return [title, seconds.toFixed(1), (count / seconds).toFixed(2), `${(seconds / base).toFixed(2)}×`, (memory / 1024 ** 2).toFixed(0)];
}

async function measured(work: () => Promise<void>): Promise<Measured> {
  let memory = 0;
  const looking = setInterval(() => {
    memory = Math.max(memory, process.memoryUsage.rss());
  }, LOOK);
  const began = performance.now();
  try {
    await work();
  } finally {
    clearInterval(looking);
  }
  return { seconds: (performance.now() - began) / 1_000, memory };
}

/** Noise, as rough iron is, softened as a lens does; each its own, so that none is the same bytes. */
async function drawPhotos(count: number, directory: string): Promise<readonly string[]> {
  const paths = Array.from({ length: count }, (_one, place) => join(directory, `${place}.jpg`));
  const noise = await sharp({ create: { ...SIZE, channels: 3, background: '#5a4636', noise: { type: 'gaussian', mean: 110, sigma: 35 } } })
    .blur(1.5)
    .raw()
    .toBuffer();
  for (const [place, path] of paths.entries()) {
    const drawn = sharp(noise, { raw: { ...SIZE, channels: 3 } }).linear(1, place % 50).jpeg({ quality: 90 });
    await writeFile(path, Buffer.concat([await drawn.toBuffer(), Buffer.from(`photo ${place}`)]));
  }
  return paths;
}

async function byLibraryAlone(paths: readonly string[]): Promise<void> {
  await inLanes(paths, AT_ONCE, async (path) => {
    for (const planned of planRenditions(SIZE)) await makeRendition({ path }, planned);
  });
}

async function throughServer(paths: readonly string[], directory: string): Promise<void> {
  const run = testRun();
  const database = await createDemoDatabase(run);
  const knex = connect(urlOf(run.adminUrl, database));
  try {
    await knex('photos').delete();
    await knex('pictures').delete();
    await serving(createPhotoMeans({ directory, bucket: undefined }), urlOf(run.adminUrl, database), knex, async (origin) => {
      const cookie = await signIn(origin, knex);
      await inLanes(paths, SENT_AT_ONCE, (path) => send(path, origin, cookie));
      while ((await Picture.query(knex).modify('waiting').resultSize()) > 0) await wait(LOOK);
    });
    const expected = paths.length * planRenditions(SIZE).length;
    const made = await PictureFile.query(knex).resultSize();
    if (made !== expected) throw new Error(`${made} renditions were made of ${expected}`);
  } finally {
    await knex.destroy();
    await dropDatabases(run.adminUrl, [database]);
  }
}

async function serving(photos: PhotoMeans, url: string, knex: Knex, work: (origin: string) => Promise<void>): Promise<void> {
  const log = keptLog();
  const jobs = startJobRunner({ url, handlings: photoHandlings({ knex, photos, logger: log.logger }), logger: log.logger });
  const server = createServer(appOver(knex, log, { photos, jobs }));
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  try {
    await work(`http://127.0.0.1:${portOf(server)}`);
  } finally {
    server.close();
    await jobs.stop();
  }
}

function portOf(server: Server): number {
  return (server.address() as AddressInfo).port;
}

async function signIn(origin: string, knex: Knex): Promise<string> {
  const { email } = await insertMember(knex, await hashPassword(PASSWORD));
  const response = await fetch(`${origin}/api/sign-in`, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json' },
    body: JSON.stringify({ email, password: PASSWORD }),
  });
  return response.headers.getSetCookie()[0]?.split(';', 1)[0] ?? '';
}

async function send(path: string, origin: string, cookie: string): Promise<void> {
  const body = new FormData();
  body.set('photo', new Blob([await readFile(path)], { type: 'image/jpeg' }), 'photo.jpg');
  const response = await fetch(`${origin}/api/photos`, { method: 'POST', headers: { Origin: ORIGIN, Cookie: cookie }, body });
  if (response.status !== 201) throw new Error(`A photo was answered ${response.status}: ${await response.text()}`);
}

async function inLanes<Item>(items: readonly Item[], lanes: number, work: (item: Item) => Promise<void>): Promise<void> {
  const waiting = items[Symbol.iterator]();
  const lane = async (): Promise<void> => {
    for (let next = waiting.next(); next.done !== true; next = waiting.next()) await work(next.value);
  };
  await Promise.all(Array.from({ length: lanes }, lane));
}
