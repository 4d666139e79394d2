// @ts-check
import { spawn } from 'node:child_process';
import { createWriteStream } from 'node:fs';
import { constants } from 'node:os';
import { setTimeout as sleep } from 'node:timers/promises';
import { root } from './project.mjs';
import { Trouble } from './say.mjs';

/**
 * @typedef {object} ChildOptions
 * @property {NodeJS.ProcessEnv} [env] whole environment; ours unless given
 * @property {string} [cwd] the project's folder unless given
 * @property {boolean} [inherit] write to our terminal instead of collecting the output
 * @property {string} [log] file that the output is copied to
 * @property {boolean} [cleaningUp] run even though this run was told to stop
 * @property {number} [limit] milliseconds after which the child is stopped
 *
 * @typedef {object} Ended
 * @property {number} code exit code; 128 + signal number where a signal ended it
 * @property {string} output both streams, in the order they came
 *
 * @typedef {object} Child
 * @property {Promise<Ended>} ended
 * @property {() => void} stop asks it to end, and makes it after `PATIENCE`
 */

/** Milliseconds between asking a child to end and making it. The server finishes its requests in 10 seconds. */
const PATIENCE = 20_000;

/** This run was told to stop: Ctrl-C, or a signal from whoever started it. */
export class Stopped extends Error {
  /** @param {NodeJS.Signals} signal */
  constructor(signal) {
    super(`stopped by ${signal}`);
    this.exitCode = 128 + constants.signals[signal];
  }
}

/** @type {Set<Child>} */
const children = new Set();

/** @type {Stopped | undefined} */
let stopped;

/** From here on a signal stops the children, and `run` and `startChild` raise `Stopped`, so that callers unwind. */
export function watchSignals() {
  for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) {
    process.on(signal, () => {
      stopped = stopped ?? new Stopped(signal);
      for (const child of children) child.stop();
    });
  }
}

/** Raises `Stopped` once this run was told to stop. */
export function raiseIfStopped() {
  if (stopped !== undefined) throw stopped;
}

/**
 * Starts a program in a process group of its own, so that Ctrl-C reaches it through us, once, in our order.
 * Should we be killed outright, the kernel ends it (parent-death signal).
 * @param {string} command
 * @param {readonly string[]} args
 * @param {ChildOptions} [options]
 * @returns {Child}
 */
export function startChild(command, args, options = {}) {
  if (options.cleaningUp !== true) raiseIfStopped();
  const spawned = spawn('setpriv', ['--pdeathsig', 'TERM', '--', command, ...args], {
    cwd: options.cwd ?? root,
    env: options.env ?? process.env,
    detached: true,
    stdio: options.inherit === true ? ['ignore', 'inherit', 'inherit'] : ['ignore', 'pipe', 'pipe'],
  });
  const log = options.log === undefined ? undefined : createWriteStream(options.log, { flags: 'a' });
  /** @type {Buffer[]} */
  const chunks = [];
  for (const stream of [spawned.stdout, spawned.stderr]) {
    stream?.on('data', (/** @type {Buffer} */ chunk) => {
      chunks.push(chunk);
      log?.write(chunk);
    });
  }

  let stopping = false;
  /** @type {NodeJS.Timeout[]} */
  const timers = [];
  /**
   * @param {NodeJS.Signals | 0} signal 0 only asks
   * @returns {boolean} whether anybody is left in the group
   */
  const signalGroup = (signal) => {
    try {
      return spawned.pid !== undefined && process.kill(-spawned.pid, signal);
    } catch {
      return false;
    }
  };
  /** What the program started itself may still be ending when it has ended. */
  const endGroup = async () => {
    const deadline = Date.now() + PATIENCE;
    if (!stopping) signalGroup('SIGTERM');
    while (signalGroup(0) && Date.now() < deadline) await sleep(50);
    signalGroup('SIGKILL');
  };
  /** @type {Child} */
  const child = {
    ended: new Promise((resolve, reject) => {
      spawned.on('error', (error) => {
        children.delete(child);
        reject(new Trouble(`${command} could not be started: ${error.message}`));
      });
      spawned.on('close', (code, signal) => {
        children.delete(child);
        for (const timer of timers) clearTimeout(timer);
        log?.end();
        const ended = {
          code: code ?? 128 + (signal === null ? 0 : constants.signals[signal]),
          output: Buffer.concat(chunks).toString('utf8'),
        };
        void endGroup().then(() => { resolve(ended); });
      });
    }),
    stop: () => {
      // Once: a second signal would cut short what the first began.
      if (stopping) return;
      stopping = true;
      signalGroup('SIGTERM');
      timers.push(setTimeout(() => { signalGroup('SIGKILL'); }, PATIENCE));
    },
  };
  if (options.limit !== undefined) timers.push(setTimeout(child.stop, options.limit));
  if (options.cleaningUp !== true) children.add(child);
  return child;
}

/**
 * Runs a program to its end.
 * @param {string} command
 * @param {readonly string[]} args
 * @param {ChildOptions} [options]
 * @returns {Promise<Ended>}
 */
export async function run(command, args, options = {}) {
  const ended = await startChild(command, args, options).ended;
  if (options.cleaningUp !== true) raiseIfStopped();
  return ended;
}
