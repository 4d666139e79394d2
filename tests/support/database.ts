import type { Knex } from 'knex';
import { afterAll, afterEach, beforeAll, beforeEach, inject } from 'vitest';
import { connect } from '#db/connection.ts';
import { cloneDatabase, dropDatabases, urlOf } from './test-databases.ts';

export type TestDatabase = {
  /** Address of this file's own database, with the demo in it; what is committed there stays until the file ends. */
  readonly url: string;
  /** This test's transaction, rolled back when it ends. A statement that fails spoils it; run such a one in a transaction of its own. */
  readonly knex: Knex.Transaction;
};

/**
 * Gives the test file a database cloned from the template, and each of its tests a transaction in it. Deferred checks of the schema
 * come at commit, so in a test they come only when it asks for them.
 */
export function useDatabase(): TestDatabase {
  let name: string | undefined;
  let connection: Knex | undefined;
  let transaction: Knex.Transaction | undefined;

  beforeAll(async () => {
    name = await cloneDatabase(inject('testRun'), inject('templateDatabase'));
    connection = connect(urlOf(inject('testRun').adminUrl, name), { poolSize: 2 });
  });
  // Not after the test alone: a hook that fails keeps those after it from running.
  const rollBack = async (): Promise<void> => {
    await transaction?.rollback();
    transaction = undefined;
  };
  beforeEach(async () => {
    await rollBack();
    transaction = await connection?.transaction();
  });
  afterEach(rollBack);
  afterAll(async () => {
    await rollBack();
    await connection?.destroy();
    if (name !== undefined) await dropDatabases(inject('testRun').adminUrl, [name]);
  });

  return {
    get url() {
      return urlOf(inject('testRun').adminUrl, inHand(name));
    },
    get knex() {
      return inHand(transaction);
    },
  };
}

function inHand<Value>(value: Value | undefined): Value {
  if (value === undefined) throw new Error('The database is there only while a test runs');
  return value;
}
