import type { Knex } from 'knex';
import { migrationSource } from '#db/migration-source.ts';
import type { PhotoStore } from '#server/files/photo-store.ts';
import type { JobRunner } from '#server/queue/job-runner.ts';
import { ProblemError } from './problem-error.ts';

type Means = { readonly knex: Knex; readonly jobs: Pick<JobRunner, 'isAlive'>; readonly store: Pick<PhotoStore, 'isWritable'> };

const NO_SUCH_TABLE = '42P01';

/**
 * Whether the database answers and has run every migration this server was written for, jobs are being worked off, and a photo could be kept.
 *
 * @throws ProblemError `unavailable` when it is behind, the queue stands still or the photo store takes nothing; the driver's own error when it is away.
 */
export async function checkReadiness({ knex, jobs, store }: Means): Promise<void> {
  const run = new Set(await namesRun(knex));
  const migrations = await migrationSource.getMigrations([]);
  const pending = migrations.map((one) => migrationSource.getMigrationName(one)).filter((name) => !run.has(name));
  if (pending.length > 0) {
    throw new ProblemError('unavailable', 'The database is being brought up to date.', {
      internal: `${pending.length} migrations have not run, the first of them ${String(pending[0])}`,
    });
  }
  if (!jobs.isAlive()) throw new ProblemError('unavailable', 'Letters and other work in the background stand still just now.');
  if (!(await store.isWritable())) throw new ProblemError('unavailable', 'Photos can’t be kept just now.');
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
