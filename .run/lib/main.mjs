// @ts-check
import { access, constants } from 'node:fs/promises';
import { delimiter, join } from 'node:path';
import { bench } from '../bench.mjs';
import { dev } from '../dev.mjs';
import { registrar } from '../registrar.mjs';
import { start } from '../start.mjs';
import { test } from '../test.mjs';
import { Stopped, watchSignals } from './children.mjs';
import { root } from './project.mjs';
import { Trouble } from './say.mjs';

/** @type {Map<string, (args: readonly string[]) => Promise<number>>} */
const COMMANDS = new Map(Object.entries({ start, dev, test, bench, registrar }));

/**
 * Runs a command and ends the process with its exit code; what the person at the terminal has to mend is said in one line.
 * @param {string} command
 * @param {readonly string[]} args
 */
export async function main(command, args) {
  watchSignals();
  process.exit(await exitCodeOf(command, args));
}

/**
 * @param {string} command
 * @param {readonly string[]} args
 */
async function exitCodeOf(command, args) {
  try {
    const perform = COMMANDS.get(command);
    if (perform === undefined) throw new Trouble(`there is no command ${command}; there are ${[...COMMANDS.keys()].join(', ')}`);
    await checkMachine();
    return await perform(args);
  } catch (error) {
    if (error instanceof Stopped) return error.exitCode;
    // Anything but trouble is a fault of these scripts, whose trace is what a report needs.
    const trace = error instanceof Error ? (error.stack ?? error.message) : String(error);
    process.stderr.write(`pourbook: ${error instanceof Trouble ? error.message : trace}\n`);
    return 1;
  }
}

async function checkMachine() {
  await access(root, constants.W_OK).catch(() => {
    throw new Trouble(`${root} can't be written to: give your account the right to, or clone the project where it has it`);
  });
  for (const tool of ['flock', 'setpriv']) {
    const folders = (process.env['PATH'] ?? '').split(delimiter);
    const found = await Promise.any(folders.map((folder) => access(join(folder, tool), constants.X_OK))).then(() => true, () => false);
    if (!found) throw new Trouble(`${tool} is missing, which Debian's package util-linux brings: this runs on Linux only`);
  }
}
