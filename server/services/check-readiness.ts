import type { Knex } from 'knex';
import { migrationSource } from '#db/migration-source.ts';
import type { JobRunner } from '#server/queue/job-runner.ts';
import { ProblemError } from './problem-error.ts';

const NO_SUCH_TABLE = '42P01';

/**
 * Whether the database answers and has run every migration this server was written for, and jobs are being worked off.
 *
 * @throws ProblemError `unavailable` when it is behind or the queue stands still; the driver's own error when it is away.
 */
export async function checkReadiness(knex: Knex, jobs: Pick<JobRunner, 'isAlive'>): Promise<void> {
  const run = new Set(await namesRun(knex));
  const migrations = await migrationSource.getMigrations([]);
  const pending = migrations.map((one) => migrationSource.getMigrationName(one)).filter((name) => !run.has(name));
  if (pending.length > 0) {
    throw new ProblemError('unavailable', 'The database is being brought up to date.', {
      internal: `${pending.length} migrations have not run, the first of them ${String(pending[0])}`,
    });
  }
  if (!jobs.isAlive()) throw new ProblemError('unavailable', 'Letters and other work in the background stand still just now.');
}

async function namesRun(knex: Knex): Promise<readonly string[]> {
  try {
    return await knex<{ name: string }>('migrations').pluck('name');
  } catch (error) {
    // A database that was never migrated is reachable all the same.
    if (error instanceof Error && 'code' in error && error.code === NO_SUCH_TABLE) return [];
    throw error;
  }
}
