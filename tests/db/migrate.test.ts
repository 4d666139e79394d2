import knex, { type Knex } from 'knex';
import { readdir } from 'node:fs/promises';
import { afterEach, beforeEach, describe, expect, inject, test } from 'vitest';
import { connect } from '#db/connection.ts';
import { knexfile } from '#db/knexfile.ts';
import { migrate } from '#db/migrate.ts';
import { migrationSource } from '#db/migration-source.ts';
import { databaseName, dropDatabases, urlOf } from '#tests/support/test-databases.ts';

let name: string;
let url: string;

beforeEach(async () => {
  const { adminUrl, name: run } = inject('testRun');
  name = databaseName(run);
  url = urlOf(adminUrl, name);
  await withKnex(adminUrl, (admin) => admin.raw('create database ??', [name]));
});
afterEach(async () => dropDatabases(inject('testRun').adminUrl, [name]));

async function withKnex<Value>(at: string, work: (connection: Knex) => PromiseLike<Value>): Promise<Value> {
  const connection = knex(knexfile(at));
  try {
    return await work(connection);
  } finally {
    await connection.destroy();
  }
}

async function migrationNames(): Promise<readonly string[]> {
  const migrations = await migrationSource.getMigrations([]);
  return migrations.map((migration) => migrationSource.getMigrationName(migration));
}

describe('migrating', () => {
  test('runs each migration of the folder once, in order', async () => {
    const files = await readdir(new URL('../../db/migrations/', import.meta.url));
    const names = files.map((file) => file.replace(/\.ts$/, '')).toSorted();
    expect(await migrationNames()).toEqual(names);
    expect(await migrate(url)).toEqual(names);
    expect(await migrate(url)).toEqual([]);
  });

  test('goes all the way down and up again', async () => {
    const names = await migrate(url);
    const left = await withKnex(url, async (connection) => {
      await connection.migrate.rollback(undefined, true);
      return connection('pg_class')
        .join('pg_namespace', 'pg_namespace.oid', 'relnamespace')
        .where('nspname', 'public')
        .where('relkind', 'r')
        .pluck('relname');
    });
    expect(left.toSorted()).toEqual(['migrations', 'migrations_lock']);
    expect(await migrate(url)).toEqual(names);
  });

  test('two at once: the work is done once', async () => {
    const outcomes = await Promise.allSettled([migrate(url), migrate(url)]);
    const ran = outcomes.flatMap((outcome) => (outcome.status === 'fulfilled' ? outcome.value : []));
    expect(ran.toSorted()).toEqual(await migrationNames());
    expect(await migrate(url)).toEqual([]);
  });

  test('a database that is not there', async () => {
    await expect(migrate(urlOf(url, 'no_such_database'))).rejects.toMatchObject({ code: '3D000' });
  });

  test('one that fails leaves nothing of itself', async () => {
    await withKnex(url, (connection) => connection.raw('create table makers (id int)'));
    await expect(migrate(url)).rejects.toMatchObject({ code: '42P07' });
    const app = connect(url);
    try {
      expect(await app('migrations')).toEqual([]);
      expect(await app.schema.hasTable('members')).toBe(false);
    } finally {
      await app.destroy();
    }
  });
});
