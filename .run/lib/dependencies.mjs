// @ts-check
import { access, mkdir, readFile, rm } from 'node:fs/promises';
import { join } from 'node:path';
import { run } from './children.mjs';
import { lock, tryLock } from './lock.mjs';
import { inCache, root } from './project.mjs';
import { Trouble, say, tellingLine } from './say.mjs';

/**
 * @typedef {object} LockedPackage
 * @property {string} [version]
 * @property {string} [integrity]
 * @property {boolean} [optional]
 * @property {string[]} [os]
 * @property {string[]} [cpu]
 * @property {string[]} [libc]
 *
 * @typedef {{ packages: Record<string, LockedPackage> }} PackageLock
 */

const LOCK = inCache('packages.lock');

/** npm's own pauses between tries keep somebody without a network waiting for minutes before they are told. */
const IMPATIENT = ['--fetch-retries=1', '--fetch-retry-mintimeout=1000'];

/** Seconds to wait for other runs of this clone that use packages which have to be replaced. */
const PATIENCE = 30;

/**
 * Sees to it that `node_modules` is what package-lock.json says, and that it stays so until released.
 * What is there is compared with the lock, not dated: a tree that npm was interrupted in, or that was changed by hand, is laid anew,
 * and one that a developer's own `npm install` brought up to date is left alone. No package is built against a version of Node
 * (install scripts don't run), so a change of Node needs no new tree.
 */
export async function holdDependencies() {
  for (;;) {
    const using = await lock(LOCK, { shared: true });
    const fault = await treeFault();
    if (fault === undefined) {
      say('packages', 'as package-lock.json says');
      return using;
    }
    await using.release();
    const changing = await tryLock(LOCK, { seconds: PATIENCE });
    if (changing === undefined) {
      throw new Trouble(`the packages have to be replaced (${fault}) but another run of this clone uses them: stop it, then try again`);
    }
    try {
      if ((await treeFault()) !== undefined) await install(fault);
    } finally {
      await changing.release();
    }
  }
}

/** @param {string} reason */
async function install(reason) {
  say('packages', `installing (${reason})`);
  const log = inCache('npm-ci.log');
  await mkdir(inCache(), { recursive: true });
  await rm(log, { force: true });
  const npm = process.env['npm_execpath'];
  const [command, first] = npm === undefined ? ['npm', []] : [process.execPath, [npm]];
  const options = ['--include=dev', '--include=optional', '--no-progress', ...IMPATIENT];
  const { code, output } = await run(command, [...first, 'ci', ...options], { log });
  const left = code === 0 ? await treeFault() : undefined;
  if (code !== 0 || left !== undefined) {
    const line = left ?? tellingLine(output.replace(/^npm error A complete log.*$/gm, ''), /npm error (code|errno|network|Missing|Invalid)/);
    throw new Trouble(`the packages could not be installed (is the network there?): ${line}; all npm said is in ${log}`);
  }
}

/** @returns {Promise<string | undefined>} why `node_modules` is not what package-lock.json says */
async function treeFault() {
  const wanted = await readLock(join(root, 'package-lock.json'));
  if (wanted === undefined) throw new Trouble('package-lock.json is missing or damaged: take it from the repository again');
  // npm writes this list last, so a tree without it was never finished.
  const installed = await readLock(join(root, 'node_modules', '.package-lock.json'));
  if (installed === undefined) return 'none are there';

  const differing = Object.entries(wanted.packages).filter(([path, entry]) => {
    if (path === '') return false;
    const there = installed.packages[path];
    if (there === undefined) return entry.optional !== true || isMadeForThisMachine(entry);
    return there.version !== entry.version || there.integrity !== entry.integrity;
  });
  const missing = await Promise.all(
    Object.keys(installed.packages).map((path) => access(join(root, path, 'package.json')).then(() => false, () => true)),
  );
  const count = differing.length + missing.filter(Boolean).length;
  return count === 0 ? undefined : `${count} differ from package-lock.json`;
}

/**
 * An optional package that names systems is one of several builds, of which a machine needs its own.
 * @param {LockedPackage} entry
 */
function isMadeForThisMachine({ os, cpu, libc }) {
  return (
    os?.includes(process.platform) === true &&
    (cpu === undefined || cpu.includes(process.arch)) &&
    (libc === undefined || libc.includes('glibc'))
  );
}

/**
 * @param {string} path
 * @returns {Promise<PackageLock | undefined>}
 */
async function readLock(path) {
  try {
    return /** @type {PackageLock} */ (JSON.parse(await readFile(path, 'utf8')));
  } catch {
    return undefined;
  }
}
