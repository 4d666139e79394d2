import pg from 'pg';
import type PgBoss from 'pg-boss';
import { CONNECTION_LIMITS } from '#db/connection.ts';

const POOL_SIZE = 2;

/** Milliseconds. Tidying a long queue takes longer than anything a visitor waits for. */
const STATEMENT_TIMEOUT = 30_000;
const ANSWER_TIMEOUT = STATEMENT_TIMEOUT + 5_000;

export type QueueDatabase = PgBoss.Db & {
  /** Milliseconds since the database last did what it was asked; infinite until it first has. */
  readonly silentFor: () => number;
  readonly close: () => Promise<void>;
};

/**
 * The queue's own few connections, apart from those requests use, so that neither waits for the other. Opens none until the first
 * statement; one on which a statement failed is not used again. `onLost` hears of connections that broke while nobody used them.
 */
export function openQueueDatabase(url: string, onLost: (error: Error) => void): QueueDatabase {
  const pool = new pg.Pool({
    connectionString: url,
    max: POOL_SIZE,
    application_name: 'pourbook jobs',
    connectionTimeoutMillis: CONNECTION_LIMITS.connect,
    idle_in_transaction_session_timeout: CONNECTION_LIMITS.idleInTransaction,
    statement_timeout: STATEMENT_TIMEOUT,
    query_timeout: ANSWER_TIMEOUT,
    keepAlive: true,
  });
  pool.on('error', onLost);
  let answeredAt = -Infinity;

  return {
    executeSql: async (text: string, values?: unknown[]) => {
      const { rows } = await pool.query<object>(text, values);
      answeredAt = performance.now();
      return { rows };
    },
    silentFor: () => performance.now() - answeredAt,
    close: () => pool.end(),
  };
}
