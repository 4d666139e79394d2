// @ts-check
import { startChild } from './lib/children.mjs';
import { holdDependencies } from './lib/dependencies.mjs';
import { packageBin } from './lib/project.mjs';
import { holdTestDatabases } from './lib/test-databases.mjs';

/**
 * `npm run bench`: the measurements of tests/bench, or those named: `npm run bench -- record`.
 * @param {readonly string[]} args handed on
 * @returns {Promise<number>} exit code
 */
export async function bench(args) {
  const packages = await holdDependencies();
  try {
    const databases = await holdTestDatabases();
    try {
      const env = { ...process.env, TEST_DATABASE_URL: databases.url, TEST_RUN_ID: databases.runId };
      const { code } = await startChild(packageBin('tsx'), ['tests/bench/main.ts', ...args], { inherit: true, env }).ended;
      return code;
    } finally {
      await databases.release();
    }
  } finally {
    await packages.release();
  }
}
