// @ts-check
import { spawn } from 'node:child_process';
import { mkdir } from 'node:fs/promises';
import { dirname } from 'node:path';
import { Trouble } from './say.mjs';

/**
 * @typedef {object} Lock
 * @property {() => Promise<void>} release
 */

/** Exit code that tells flock's "somebody else has it" from every other failure. */
export const LOCK_TAKEN = 75;

/**
 * Holds a lock on a file until released, or until this process dies in whatever way: a `flock` helper holds it for as long as
 * our end of its pipe is open, so nothing is left behind to recover from.
 * @param {string} path made if missing
 * @param {{ shared?: boolean, seconds?: number }} [options] `seconds` to wait, 0 for not at all; without it as long as it takes
 * @returns {Promise<Lock | undefined>} undefined where somebody else kept it
 */
export async function tryLock(path, { shared = false, seconds } = {}) {
  await mkdir(dirname(path), { recursive: true });
  const patience = seconds === undefined ? [] : seconds === 0 ? ['-n'] : ['-w', String(seconds)];
  const helper = spawn(
    'flock',
    [shared ? '-s' : '-x', ...patience, '-E', String(LOCK_TAKEN), path, 'sh', '-c', 'echo held; exec cat'],
    // A group of its own: Ctrl-C must not take the lock from us while we clean up.
    { stdio: ['pipe', 'pipe', 'pipe'], detached: true, cwd: '/' },
  );
  /** @type {Promise<number | null>} */
  const ended = new Promise((resolve, reject) => {
    helper.on('error', (error) => { reject(new Trouble(`flock could not be started: ${error.message}`)); });
    helper.on('close', resolve);
  });
  let complaint = '';
  helper.stderr.on('data', (/** @type {Buffer} */ chunk) => { complaint += chunk.toString('utf8'); });
  /** @type {Promise<'held'>} */
  const held = new Promise((resolve) => { helper.stdout.once('data', () => { resolve('held'); }); });

  const first = await Promise.race([held, ended]);
  if (first === LOCK_TAKEN) return undefined;
  if (first !== 'held') throw new Trouble(`${path} could not be locked: ${complaint.trim()}`);
  return {
    release: async () => {
      helper.stdin.end();
      await ended;
    },
  };
}

/**
 * As `tryLock`, waiting as long as it takes.
 * @param {string} path
 * @param {{ shared?: boolean }} [options]
 * @returns {Promise<Lock>}
 */
export async function lock(path, options = {}) {
  const taken = await tryLock(path, options);
  if (taken === undefined) throw new Error(`flock gave up on ${path} without having been told how long to wait`);
  return taken;
}

/**
 * Does something that no other run may do at the same time.
 * @template T
 * @param {string} path
 * @param {() => Promise<T>} work
 * @returns {Promise<T>}
 */
export async function alone(path, work) {
  const held = await lock(path);
  try {
    return await work();
  } finally {
    await held.release();
  }
}
