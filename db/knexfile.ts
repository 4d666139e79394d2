import type { Knex } from 'knex';
import { CONNECTION_LIMITS, QUIET_LOG } from './connection.ts';
import { migrationSource } from './migration-source.ts';

/** How long, in milliseconds, a migration waits for a table in use before it gives up and changes nothing. */
const LOCK_TIMEOUT = 10_000;

/**
 * The settings migrations run under. Without the application's snake_case mappers: a migration is written in real column names.
 * Without a limit on statements: a migration that moves many rows takes as long as it takes.
 */
export function knexfile(url: string): Knex.Config {
  return {
    client: 'pg',
    connection: {
      connectionString: url,
      application_name: 'pourbook migrations',
      connectionTimeoutMillis: CONNECTION_LIMITS.connect,
      options: `-c lock_timeout=${LOCK_TIMEOUT}`,
    },
    pool: { min: 0, max: 2 },
    log: QUIET_LOG,
    migrations: { migrationSource, tableName: 'migrations' },
  };
}
