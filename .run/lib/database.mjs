// @ts-check
import { run } from './children.mjs';
import { alone } from './lock.mjs';
import { ensureDatabase, expectAnswer, holdPostgres, sqlRunner } from './postgres.mjs';
import { inCache, packageBin } from './project.mjs';
import { Trouble, say, tellingLine } from './say.mjs';
import { hashSources } from './sources.mjs';

/**
 * @typedef {object} Database
 * @property {string} url
 * @property {boolean} hasDemo whether the demo was filled in
 * @property {() => Promise<void>} release
 */

/** All that the demo depends on. */
const DEMO_SOURCES = ['fixtures', 'db', 'server/domain', 'server/contract'];

/**
 * The database to serve from, migrated: the one `DATABASE_URL` names, else this clone's own, which gets the demo.
 * One that was named gets it only where `DEMO=1` asks for it.
 * @returns {Promise<Database>}
 */
export async function holdDatabase() {
  const given = process.env['DATABASE_URL'];
  const isOwn = given === undefined || given === '';
  const { url, release } = isOwn ? await holdOwnDatabase() : await namedDatabase(given);
  const hasDemo = isOwn || process.env['DEMO'] === '1';
  try {
    await alone(inCache('database-preparation.lock'), async () => {
      await runScript('db/migrate.ts', url, 'the database could not be migrated');
      say('database', 'migrated');
      if (hasDemo) await seedDemo(url);
    });
    return { url, hasDemo, release };
  } catch (error) {
    await release();
    throw error;
  }
}

/**
 * @param {string} url
 * @returns {Promise<Pick<Database, 'url' | 'release'>>}
 */
async function namedDatabase(url) {
  await expectAnswer('DATABASE_URL', url);
  return { url, release: () => Promise.resolve() };
}

/** @returns {Promise<Pick<Database, 'url' | 'release'>>} */
async function holdOwnDatabase() {
  const postgres = await holdPostgres();
  try {
    await ensureDatabase(postgres, 'pourbook');
    return { url: postgres.url('pourbook'), release: postgres.release };
  } catch (error) {
    await postgres.release();
    throw error;
  }
}

/**
 * Fills in the demo unless this very demo was filled in before; the database itself remembers which, in its comment.
 * @param {string} url
 */
async function seedDemo(url) {
  const sql = sqlRunner(url);
  const mark = `demo ${await hashSources(DEMO_SOURCES)}`;
  const [row] = await sql("select shobj_description(oid, 'pg_database') as mark from pg_database where datname = current_database()");
  if (row?.['mark'] === mark) {
    say('demo', 'in place');
    return;
  }
  say('demo', 'filling it in; drawing its photos takes a minute or two');
  await runScript('fixtures/demo/seed.ts', url, 'the demo could not be filled in');
  const [name] = await sql('select quote_ident(current_database()) as quoted');
  await sql(`comment on database ${String(name?.['quoted'])} is '${mark}'`);
  say('demo', 'filled in');
}

/**
 * @param {string} script
 * @param {string} url
 * @param {string} trouble
 */
async function runScript(script, url, trouble) {
  const { code, output } = await run(packageBin('tsx'), [script], { env: { ...process.env, DATABASE_URL: url } });
  if (code === 0) return;
  process.stderr.write(output);
  throw new Trouble(`${trouble} (${script}): ${tellingLine(output, /error/i)}`);
}
