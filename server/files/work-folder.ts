import { mkdir, mkdtemp, readdir, rm, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { asDiskFault } from './disk-fault.ts';

const FOLDER_MODE = 0o750;

/**
 * Gives the work a folder of its own inside `directory`, and takes it away with all that is in it however the work ends.
 *
 * @throws PhotoStoreError where the disk makes none.
 */
export async function withWorkFolder<Answer>(directory: string, work: (folder: string) => Promise<Answer>): Promise<Answer> {
  const folder = await makeFolder(directory);
  try {
    return await work(folder);
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

async function makeFolder(directory: string): Promise<string> {
  try {
    await mkdir(directory, { recursive: true, mode: FOLDER_MODE });
    return await mkdtemp(join(directory, 'work-'));
  } catch (error) {
    throw asDiskFault(error);
  }
}

/** Takes away what a server that was killed left in `directory`, if it is older than `before`. Answers how much. */
export async function sweepWorkFolders(directory: string, before: Date): Promise<number> {
  let swept = 0;
  for (const name of await namesIn(directory)) {
    const path = join(directory, name);
    const facts = await stat(path).catch(() => undefined);
    if (facts === undefined || facts.mtime >= before) continue;
    await rm(path, { recursive: true, force: true });
    swept += 1;
  }
  return swept;
}

async function namesIn(directory: string): Promise<readonly string[]> {
  try {
    return await readdir(directory);
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'ENOENT') return [];
    throw error;
  }
}
