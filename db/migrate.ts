import knex from 'knex';
import { pathToFileURL } from 'node:url';
import { knexfile } from './knexfile.ts';
import { installQueues } from './queues.ts';

/**
 * Brings the database at `url` up to the newest migration and answers the names of those it ran, in order; none when it was up to date.
 * All of them are one transaction: if one fails, the database is as it was. Of two runners at once, one waits and finds nothing to do.
 */
export async function migrate(url: string): Promise<readonly string[]> {
  const owner = knex(knexfile(url));
  try {
    const outcome: unknown = await owner.migrate.latest();
    await installQueues(url);
    return namesIn(outcome);
  } finally {
    await owner.destroy();
  }
}

/** Knex answers `[batch, names]` and types it as anything. */
function namesIn(outcome: unknown): readonly string[] {
  const names: unknown = Array.isArray(outcome) ? outcome[1] : undefined;
  if (!Array.isArray(names)) throw new TypeError('the migrations ran, but not in the way this expects them to tell of it');
  return names.map(String);
}

async function main(): Promise<void> {
  const url = process.env['DATABASE_URL'];
  if (url === undefined || url === '') throw new Error('DATABASE_URL is not set: say which database to migrate');
  const names = await migrate(url);
  process.stdout.write(names.length === 0 ? 'The database is up to date.\n' : names.map((name) => `Ran ${name}.\n`).join(''));
}

if (process.argv[1] !== undefined && import.meta.url === pathToFileURL(process.argv[1]).href) await main();
