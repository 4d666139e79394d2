import knex, { type Knex } from 'knex';
import { knexSnakeCaseMappers } from 'objection';
import { registerTypes } from './types.ts';

/** Times in milliseconds. */
export const CONNECTION_LIMITS = {
  poolSize: 10,
  connect: 3_000,
  acquire: 5_000,
  statement: 5_000,
  lock: 2_000,
  idleInTransaction: 10_000,
} as const;

/** What goes wrong is thrown: Knex need not print it as well, with the text of the query. */
export const QUIET_LOG = { error: () => undefined, warn: () => undefined };

export type ConnectionOptions = {
  /** Most connections held at once; all pools together must stay under the server's `max_connections`. */
  readonly poolSize?: number;
  /** Longest statement, in milliseconds; 0 = no limit. */
  readonly statementTimeout?: number;
  /** What the connection calls itself in the server's list of activity. */
  readonly applicationName?: string;
};

/**
 * The application's way to the database: names are camelCase in code and snake_case in SQL, values are as types.ts decides.
 * Opens nothing until the first query. A query that finds no free connection fails after `CONNECTION_LIMITS.acquire`.
 */
export function connect(url: string, options: ConnectionOptions = {}): Knex {
  return knex({
    client: 'pg',
    connection: {
      connectionString: url,
      types: registerTypes(),
      application_name: options.applicationName ?? 'pourbook',
      // The register's instants are UTC, and ISO is the only style the parsers read.
      options: `-c timezone=UTC -c datestyle=ISO -c lock_timeout=${CONNECTION_LIMITS.lock}`,
      connectionTimeoutMillis: CONNECTION_LIMITS.connect,
      statement_timeout: options.statementTimeout ?? CONNECTION_LIMITS.statement,
      idle_in_transaction_session_timeout: CONNECTION_LIMITS.idleInTransaction,
    },
    pool: { min: 0, max: options.poolSize ?? CONNECTION_LIMITS.poolSize },
    acquireConnectionTimeout: CONNECTION_LIMITS.acquire,
    log: QUIET_LOG,
    ...knexSnakeCaseMappers(),
  });
}
