import { randomBytes } from 'node:crypto';
import knex from 'knex';
import type { Knex } from 'knex';
import { connect } from '#db/connection.ts';
import { migrate } from '#db/migrate.ts';
import { seedDemo } from '#fixtures/demo/seed.ts';

/** Every database of one run is named by it, so that whoever started the run can drop what a killed one left. */
export type TestRun = { readonly adminUrl: string; readonly name: string };

/**
 * The run's databases live on the server `TEST_DATABASE_URL` names, as a role that may create them.
 *
 * @throws with one line when it is not set.
 */
export function testRun(): TestRun {
  const adminUrl = process.env['TEST_DATABASE_URL'];
  if (adminUrl === undefined || adminUrl === '') {
    throw new Error('TEST_DATABASE_URL is not set: name a PostgreSQL server and a role that may create databases, or run `npm test`');
  }
  return { adminUrl, name: `pourbook_test_${process.env['TEST_RUN_ID'] ?? randomBytes(4).toString('hex')}` };
}

/** A name no other database of the run has. */
export function databaseName(runName: string): string {
  return `${runName}_${randomBytes(4).toString('hex')}`;
}

/** The address of a database beside the one an address names. */
export function urlOf(adminUrl: string, database: string): string {
  const url = new URL(adminUrl);
  url.pathname = `/${database}`;
  return url.href;
}

/** A migrated database with the demo in it. */
export async function createDemoDatabase({ adminUrl, name }: TestRun): Promise<string> {
  const database = databaseName(name);
  await withAdmin(adminUrl, (admin) => admin.raw('create database ??', [database]));
  const url = urlOf(adminUrl, database);
  await migrate(url);
  const connection = connect(url, { statementTimeout: 0 });
  try {
    await seedDemo(connection);
  } finally {
    await connection.destroy();
  }
  return database;
}

/** A copy of a database nobody is connected to. */
export async function cloneDatabase({ adminUrl, name }: TestRun, template: string): Promise<string> {
  const database = databaseName(name);
  await withAdmin(adminUrl, (admin) => admin.raw('create database ?? template ??', [database, template]));
  return database;
}

/**
 * Drops databases, cutting off whoever of ours is still connected. Not by force: that is refused while the server's own vacuuming is at work
 * there, which dropping as such ends by itself.
 */
export async function dropDatabases(adminUrl: string, databases: readonly string[]): Promise<void> {
  await withAdmin(adminUrl, async (admin) => {
    for (const database of databases) {
      await admin.raw('select pg_terminate_backend(pid) from pg_stat_activity where datname = ? and usename = current_user', [database]);
      await admin.raw('drop database if exists ??', [database]);
    }
  });
}

async function withAdmin(adminUrl: string, work: (admin: Knex) => PromiseLike<unknown>): Promise<void> {
  const admin = knex({ client: 'pg', connection: adminUrl, pool: { min: 0, max: 1 } });
  try {
    await work(admin);
  } finally {
    await admin.destroy();
  }
}
