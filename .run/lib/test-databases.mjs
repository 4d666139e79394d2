// @ts-check
import { randomBytes } from 'node:crypto';
import { readdir, rm } from 'node:fs/promises';
import { alone, lock, tryLock } from './lock.mjs';
import { expectAnswer, holdPostgres, sqlRunner } from './postgres.mjs';
import { inData } from './project.mjs';

/**
 * @typedef {object} TestDatabases
 * @property {string} url for a role that may create databases
 * @property {string} runId every database of this run is named `pourbook_test_` and this, and more after an underscore if need be
 * @property {() => Promise<void>} release drops them
 */

/** One locked file for each test run that lives; one that nobody locks was left by a run that died. */
const RUNS = inData('test-runs');
const SWEEP_LOCK = inData('test-runs.lock');

/**
 * A place for this run's test databases: on the server `TEST_DATABASE_URL` names, else on this clone's own.
 * @returns {Promise<TestDatabases>}
 */
export async function holdTestDatabases() {
  const runId = randomBytes(4).toString('hex');
  const given = process.env['TEST_DATABASE_URL'];
  if (given !== undefined && given !== '') {
    await expectAnswer('TEST_DATABASE_URL', given);
    return { url: given, runId, release: () => dropDatabases(sqlRunner(given), runId) };
  }

  const postgres = await holdPostgres();
  try {
    const living = await alone(SWEEP_LOCK, async () => {
      await sweep(postgres.asSuperuser);
      return lock(`${RUNS}/${runId}`);
    });
    return {
      url: postgres.url('postgres'),
      runId,
      release: async () => {
        try {
          await dropDatabases(postgres.asSuperuser, runId);
          await rm(`${RUNS}/${runId}`, { force: true });
        } finally {
          await living.release();
          await postgres.release();
        }
      },
    };
  } catch (error) {
    await postgres.release();
    throw error;
  }
}

/** @param {ReturnType<typeof sqlRunner>} sql */
async function sweep(sql) {
  /** @type {string[]} */
  const ids = await readdir(RUNS).catch(() => []);
  for (const id of ids) {
    const dead = await tryLock(`${RUNS}/${id}`, { seconds: 0 });
    if (dead === undefined) continue;
    await dropDatabases(sql, id);
    await rm(`${RUNS}/${id}`, { force: true });
    await dead.release();
  }
}

/**
 * @param {ReturnType<typeof sqlRunner>} sql
 * @param {string} runId
 */
async function dropDatabases(sql, runId) {
  const found = await sql('select quote_ident(datname) as name from pg_database where starts_with(datname, $1)', [`pourbook_test_${runId}`]);
  for (const { name } of found) await sql(`drop database if exists ${String(name)} with (force)`);
}
