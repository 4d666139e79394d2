// @ts-check
import { startChild } from './lib/children.mjs';
import { holdDependencies } from './lib/dependencies.mjs';
import { packageBin } from './lib/project.mjs';

/**
 * `npm run bench`: the measurements of tests/bench.
 * @param {readonly string[]} args handed on
 * @returns {Promise<number>} exit code
 */
export async function bench(args) {
  const packages = await holdDependencies();
  try {
    const { code } = await startChild(packageBin('tsx'), ['tests/bench/main.ts', ...args], { inherit: true }).ended;
    return code;
  } finally {
    await packages.release();
  }
}
