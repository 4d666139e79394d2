import { createHash, randomBytes } from 'node:crypto';
import { mkdtemp, readdir, readFile, rm, stat, utimes, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { buffer } from 'node:stream/consumers';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { createBucketStore } from '#server/files/bucket-store.ts';
import { createLocalStore } from '#server/files/local-store.ts';
import type { PhotoStore } from '#server/files/photo-store.ts';
import { startFakeBucket } from '#tests/support/fake-bucket.ts';
import type { FakeBucket } from '#tests/support/fake-bucket.ts';

type Harness = {
  readonly store: PhotoStore;
  /** From now on the store can't be written or read. */
  readonly deny: () => Promise<void>;
  /** Makes a file a day and an hour old. */
  readonly age: (key: string) => Promise<void>;
  /** All that is kept, half or whole. */
  readonly kept: () => Promise<number>;
};

const DAY = 24 * 60 * 60 * 1_000;
const PICTURE = 'a1'.repeat(16);

let bucket: FakeBucket;
let directory: string;
beforeAll(async () => {
  bucket = await startFakeBucket();
});
afterAll(() => bucket.stop());
beforeEach(async () => {
  bucket.files.clear();
  bucket.ages.clear();
  bucket.misbehave(undefined);
  directory = await mkdtemp(join(tmpdir(), 'pourbook-store-'));
  return () => rm(directory, { recursive: true, force: true });
});

const HARNESSES: Readonly<Record<string, () => Harness>> = {
  folder: () => ({
    store: createLocalStore(join(directory, 'photos'), join(directory, 'photos', 'incoming')),
    // Not by its mode, which means nothing to root.
    deny: async () => {
      await rm(join(directory, 'photos'), { recursive: true, force: true });
      await writeFile(join(directory, 'photos'), '');
    },
    age: async (key) => {
      const then = new Date(Date.now() - DAY - 3_600_000);
      await utimes(join(directory, 'photos', key), then, then);
    },
    kept: async () => {
      const all = await readdir(join(directory, 'photos'), { recursive: true, withFileTypes: true }).catch(() => []);
      return all.filter((one) => one.isFile()).length;
    },
  }),
  bucket: () => ({
    store: createBucketStore(bucket.settings, { requestTimeout: 300 }),
    deny: () => {
      bucket.misbehave('denies');
      return Promise.resolve();
    },
    age: (key) => {
      bucket.ages.set(key, DAY + 3_600_000);
      return Promise.resolve();
    },
    kept: () => Promise.resolve(bucket.files.size),
  }),
};

function digest(bytes: Uint8Array): { sha256: Buffer } {
  return { sha256: createHash('sha256').update(bytes).digest() };
}

describe.each(Object.keys(HARNESSES))('a store that is a %s', (name) => {
  let harness: Harness;
  let store: PhotoStore;
  beforeEach(() => {
    harness = HARNESSES[name]!();
    ({ store } = harness);
  });

  test('gives back what it was given, from memory and from a file', async () => {
    const bytes = randomBytes(300_000);
    await store.put(`${PICTURE}/original`, bytes, digest(bytes));
    const path = join(directory, 'sent');
    await writeFile(path, bytes);
    await store.put(`${PICTURE}/page-960.webp`, { path }, digest(bytes));
    for (const key of [`${PICTURE}/original`, `${PICTURE}/page-960.webp`]) {
      const file = await store.get(key);
      expect(file.bytes).toBe(bytes.length);
      expect((await buffer(file.stream)).equals(bytes)).toBe(true);
    }
  });

  test('keeps the later of two files of one key', async () => {
    await store.put(`${PICTURE}/original`, Buffer.from('first'), digest(Buffer.from('first')));
    await store.put(`${PICTURE}/original`, Buffer.from('second'), digest(Buffer.from('second')));
    expect((await buffer((await store.get(`${PICTURE}/original`)).stream)).toString()).toBe('second');
    expect(await harness.kept()).toBe(1);
  });

  test('says of a file it does not hold that it is missing, and removes it all the same', async () => {
    await expect(store.get(`${PICTURE}/original`)).rejects.toMatchObject({ name: 'PhotoStoreError', fault: 'missing' });
    await expect(store.remove(`${PICTURE}/original`)).resolves.toBeUndefined();
    await store.put(`${PICTURE}/original`, Buffer.from('here'), digest(Buffer.from('here')));
    await store.remove(`${PICTURE}/original`);
    await expect(store.get(`${PICTURE}/original`)).rejects.toMatchObject({ fault: 'missing' });
    expect(await harness.kept()).toBe(0);
  });

  test('keeps nothing of bytes that are not those announced', async () => {
    const put = store.put(`${PICTURE}/original`, Buffer.from('sent'), digest(Buffer.from('announced')));
    await expect(put).rejects.toMatchObject({ name: 'PhotoStoreError', fault: 'corrupt' });
    expect(await harness.kept()).toBe(0);
  });

  test('keeps nothing of a file that can’t be read to its end', async () => {
    await expect(store.put(`${PICTURE}/original`, { path: join(directory, 'nowhere') }, digest(Buffer.from('x')))).rejects.toMatchObject({ name: 'PhotoStoreError' });
    expect(await harness.kept()).toBe(0);
  });

  test('lists every file with its age, page after page', async () => {
    const keys = Array.from({ length: 7 }, (_one, place) => `${PICTURE}/page-${place + 1}.webp`);
    for (const key of keys) await store.put(key, Buffer.from(key), digest(Buffer.from(key)));
    await harness.age(keys[2]!);
    const listed = [];
    for await (const { key, modifiedAt } of store.list()) listed.push({ key, isOld: modifiedAt.getTime() < Date.now() - DAY });
    expect(listed.sort((one, other) => one.key.localeCompare(other.key))).toEqual(keys.map((key, place) => ({ key, isOld: place === 2 })));
  });

  test('is writable until it is denied, and then says that it is away', async () => {
    expect(await store.isWritable()).toBe(true);
    await harness.deny();
    expect(await store.isWritable()).toBe(false);
    await expect(store.put(`${PICTURE}/original`, Buffer.from('x'), digest(Buffer.from('x')))).rejects.toMatchObject({ fault: 'away' });
    await expect(store.get(`${PICTURE}/original`)).rejects.toMatchObject({ fault: 'away' });
    await expect(store.remove(`${PICTURE}/original`)).rejects.toMatchObject({ fault: 'away' });
  });

  test.each(['../etc/passwd', `${PICTURE}/../../x`, `${PICTURE}/a/b`, 'incoming/x', `${PICTURE}/`, `${PICTURE}/.hidden`, `/${PICTURE}/original`])('takes no key like %s', async (key) => {
    await expect(store.put(key, Buffer.from('x'), digest(Buffer.from('x')))).rejects.toThrow(RangeError);
    await expect(store.get(key)).rejects.toThrow(RangeError);
    expect(await harness.kept()).toBe(0);
  });
});

describe('a folder', () => {
  test('lets nobody but its own account and group read a file, and lists neither drafts nor strangers', async () => {
    const store = createLocalStore(directory, join(directory, 'incoming'));
    await store.put(`${PICTURE}/original`, Buffer.from('x'), digest(Buffer.from('x')));
    await writeFile(join(directory, 'incoming', 'draft'), 'half');
    await writeFile(join(directory, 'README'), 'not ours');
    expect((await stat(join(directory, PICTURE, 'original'))).mode & 0o777 & ~0o640).toBe(0);
    const keys = [];
    for await (const { key } of store.list()) keys.push(key);
    expect(keys).toEqual([`${PICTURE}/original`]);
    expect(await readFile(join(directory, 'README'), 'utf8')).toBe('not ours');
  });

  test('that was never made holds nothing', async () => {
    const store = createLocalStore(join(directory, 'none'), join(directory, 'none', 'incoming'));
    for await (const entry of store.list()) expect.unreachable(entry.key);
    await expect(store.get(`${PICTURE}/original`)).rejects.toMatchObject({ fault: 'missing' });
  });
});

describe('a bucket', () => {
  const bytes = Buffer.from('a file of some length');

  test.each(['hangs', 'fails'] as const)('that %s is away, after some tries and no longer', async (how) => {
    const store = createBucketStore(bucket.settings, { requestTimeout: 100 });
    bucket.misbehave(how);
    const before = bucket.requests().length;
    await expect(store.put(`${PICTURE}/original`, bytes, digest(bytes))).rejects.toMatchObject({ fault: 'away' });
    expect(bucket.requests().length - before).toBe(3);
  });

  test('that breaks off in a file breaks off what is read', async () => {
    const store = createBucketStore(bucket.settings);
    await store.put(`${PICTURE}/original`, bytes, digest(bytes));
    bucket.misbehave('truncates');
    const { stream } = await store.get(`${PICTURE}/original`);
    await expect(buffer(stream)).rejects.toThrow();
  });

  test('that has no room says so', async () => {
    bucket.misbehave('is-full');
    await expect(createBucketStore(bucket.settings).put(`${PICTURE}/original`, bytes, digest(bytes))).rejects.toMatchObject({ fault: 'full' });
  });

  test('is asked with a signature, and holds other things that are none of ours', async () => {
    const stranger = createBucketStore({ ...bucket.settings, accessKeyId: 'another-key' });
    await expect(stranger.put(`${PICTURE}/original`, bytes, digest(bytes))).rejects.toMatchObject({ fault: 'away' });
    bucket.files.set('elsewhere/thing', bytes);
    for await (const entry of createBucketStore(bucket.settings).list()) expect.unreachable(entry.key);
  });
});
