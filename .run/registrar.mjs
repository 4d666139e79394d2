// @ts-check
import { startChild } from './lib/children.mjs';
import { holdDatabase } from './lib/database.mjs';
import { holdDependencies } from './lib/dependencies.mjs';

/**
 * `npm run registrar -- ADDRESS`: makes a member with a confirmed address a registrar, as the first one is made.
 * @param {readonly string[]} args
 * @returns {Promise<number>} exit code
 */
export async function registrar(args) {
  const packages = await holdDependencies();
  try {
    const database = await holdDatabase();
    try {
      const env = { ...process.env, DATABASE_URL: database.url };
      const { code } = await startChild(process.execPath, ['--import', 'tsx', 'server/main-registrar.ts', ...args], { inherit: true, env }).ended;
      return code;
    } finally {
      await database.release();
    }
  } finally {
    await packages.release();
  }
}
