// @ts-check
import { createHash } from 'node:crypto';
import { readFile, readdir } from 'node:fs/promises';
import { join } from 'node:path';
import { root } from './project.mjs';

/**
 * One hash over files and whole folders: their names and contents.
 * @param {readonly string[]} paths relative to the project; those that don't exist count as such
 * @returns {Promise<string>}
 */
export async function hashSources(paths) {
  const hash = createHash('sha256');
  for (const path of paths) {
    for (const file of await filesUnder(path)) {
      hash.update(`${file}\n`).update(await readFile(join(root, file))).update('\n');
    }
  }
  return hash.digest('hex');
}

/**
 * @param {string} path
 * @returns {Promise<string[]>}
 */
async function filesUnder(path) {
  try {
    const entries = await readdir(join(root, path), { withFileTypes: true });
    entries.sort((a, b) => (a.name < b.name ? -1 : 1));
    const nested = await Promise.all(
      entries.map((entry) => (entry.isDirectory() ? filesUnder(join(path, entry.name)) : Promise.resolve([join(path, entry.name)]))),
    );
    return nested.flat();
  } catch (error) {
    if (!(error instanceof Error) || !('code' in error)) throw error;
    if (error.code === 'ENOTDIR') return [path];
    if (error.code === 'ENOENT') return [];
    throw error;
  }
}
