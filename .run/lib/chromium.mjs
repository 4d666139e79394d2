// @ts-check
import { access, constants } from 'node:fs/promises';
import { delimiter, join } from 'node:path';
import { installDebian } from './apt.mjs';
import { Trouble } from './say.mjs';

/**
 * A Chromium for the browser tests: the one `CHROMIUM_PATH` names, else the machine's own, else Debian's, installed now.
 * @returns {Promise<string>} its path
 */
export async function findChromium() {
  const named = process.env['CHROMIUM_PATH'];
  if (named !== undefined && named !== '') {
    if (await isProgram(named)) return named;
    throw new Trouble(`CHROMIUM_PATH names ${named}, which is no program that can be run`);
  }
  const found = await onPath('chromium');
  if (found !== undefined) return found;
  await installDebian('chromium', 'Chromium', async () => (await onPath('chromium')) !== undefined);
  const installed = await onPath('chromium');
  if (installed === undefined) throw new Trouble('Chromium was installed but is not on PATH: name it in CHROMIUM_PATH');
  return installed;
}

/**
 * @param {string} name
 * @returns {Promise<string | undefined>}
 */
async function onPath(name) {
  for (const folder of [...(process.env['PATH'] ?? '').split(delimiter), '/usr/bin']) {
    const path = join(folder, name);
    if (folder !== '' && (await isProgram(path))) return path;
  }
  return undefined;
}

/** @param {string} path */
async function isProgram(path) {
  return access(path, constants.X_OK).then(() => true, () => false);
}
