import { createHash, randomBytes } from 'node:crypto';
import type { Dirent } from 'node:fs';
import { createReadStream } from 'node:fs';
import { mkdir, open, readdir, rename, rm, rmdir, stat, statfs } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { asDiskFault } from './disk-fault.ts';
import { isStoreKey, partsOfKey, PhotoStoreError } from './photo-store.ts';
import type { PhotoStore, StoredFile, StoreEntry, StoreSource } from './photo-store.ts';

/** Files are for the server's own account and group alone. */
const FILE_MODE = 0o640;
const FOLDER_MODE = 0o750;

/** A disk that is fuller than this takes no more photos, so that the rest of the machine still works. */
const LEAST_FREE = 0.05;

/**
 * Photos in a folder: `<directory>/<store key>/<name>`. A file is written beside them, in `staging`, which is to be on the same file system,
 * then synced, moved to its place and the folder synced, so that it is there whole or not at all, whenever the machine stops.
 */
export function createLocalStore(directory: string, staging: string): PhotoStore {
  const pathOf = (key: string): string => join(directory, ...partsOfKey(key));

  const put = async (key: string, source: StoreSource, sha256: Buffer): Promise<void> => {
    const target = pathOf(key);
    const draft = join(staging, randomBytes(16).toString('hex'));
    await mkdir(staging, { recursive: true, mode: FOLDER_MODE });
    try {
      await writeSynced(draft, source, sha256);
      const made = await mkdir(dirname(target), { recursive: true, mode: FOLDER_MODE });
      await rename(draft, target);
      await sync(dirname(target));
      if (made !== undefined) await sync(directory);
    } finally {
      await rm(draft, { force: true });
    }
  };

  return {
    put: (key, source, { sha256 }) => guarded(() => put(key, source, sha256)),
    get: (key) => guarded(() => openFile(pathOf(key))),
    remove: (key) =>
      guarded(async () => {
        const path = pathOf(key);
        await rm(path, { force: true });
        // Gone with its last file; one that holds others stays.
        await rmdir(dirname(path)).catch(() => undefined);
      }),
    list: () => listFolder(directory),
    isWritable: async () => {
      try {
        await mkdir(directory, { recursive: true, mode: FOLDER_MODE });
        const probe = join(staging, `probe-${randomBytes(8).toString('hex')}`);
        await mkdir(staging, { recursive: true, mode: FOLDER_MODE });
        await writeSynced(probe, Buffer.from('probe'), createHash('sha256').update('probe').digest());
        await rm(probe);
        const { bavail, blocks } = await statfs(directory);
        return bavail >= blocks * LEAST_FREE;
      } catch {
        return false;
      }
    },
  };
}

async function writeSynced(path: string, source: StoreSource, sha256: Buffer): Promise<void> {
  const hash = createHash('sha256');
  const file = await open(path, 'wx', FILE_MODE);
  try {
    for await (const chunk of source instanceof Uint8Array ? [source] : createReadStream(source.path)) {
      const bytes = chunk as Uint8Array;
      hash.update(bytes);
      await file.writeFile(bytes);
    }
    await file.sync();
  } finally {
    await file.close();
  }
  if (!hash.digest().equals(sha256)) throw new PhotoStoreError('corrupt', 'The bytes to keep are not those announced');
}

async function sync(folder: string): Promise<void> {
  const handle = await open(folder);
  try {
    await handle.sync();
  } finally {
    await handle.close();
  }
}

async function openFile(path: string): Promise<StoredFile> {
  const file = await open(path);
  const facts = await file.stat();
  if (facts.isFile()) return { bytes: facts.size, stream: file.createReadStream() };
  await file.close();
  throw new PhotoStoreError('missing', 'The store holds no such file');
}

async function* listFolder(directory: string): AsyncGenerator<StoreEntry> {
  for (const folder of await guarded(() => entriesOf(directory))) {
    if (!folder.isDirectory() || !isStoreKey(folder.name)) continue;
    for (const { name } of await guarded(() => entriesOf(join(directory, folder.name)))) {
      const facts = await stat(join(directory, folder.name, name)).catch(() => undefined);
      if (facts?.isFile() === true) yield { key: `${folder.name}/${name}`, modifiedAt: facts.mtime };
    }
  }
}

/** A folder that is not there yet, or no longer, holds nothing. */
async function entriesOf(folder: string): Promise<readonly Dirent[]> {
  try {
    return await readdir(folder, { withFileTypes: true });
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'ENOENT') return [];
    throw error;
  }
}

async function guarded<Answer>(work: () => Promise<Answer>): Promise<Answer> {
  try {
    return await work();
  } catch (error) {
    throw asDiskFault(error);
  }
}
