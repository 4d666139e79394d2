import type { Knex } from 'knex';
import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { connect } from '#db/connection.ts';
import { CastingPage } from '#contract/castings.ts';
import { ModelPage } from '#contract/models.ts';
import { appOver } from '#tests/support/app.ts';
import { useDatabase } from '#tests/support/database.ts';
import { keptLog } from '#tests/support/log.ts';

const database = useDatabase();
let knex: Knex | undefined;
let agent: supertest.Agent | undefined;
let queries = 0;

beforeAll(() => {
  knex = connect(database.url, { poolSize: 1 });
  knex.on('query', () => {
    queries += 1;
  });
  agent = supertest.agent(appOver(knex, keptLog()));
});
afterAll(async () => {
  await knex?.destroy();
});

/** How many statements one answer takes, and what it is. */
async function counted(path: string): Promise<{ readonly count: number; readonly body: unknown }> {
  const before = queries;
  const response = await agent?.get(path);
  expect(response?.status, path).toBe(200);
  return { count: queries - before, body: response?.body };
}

describe('the statements an answer takes', () => {
  test('to a model are as many for a long checklist as for a short one', async () => {
    const [long, short] = [await counted('/api/models/brackwater-30-crawler'), await counted('/api/models/skerry-2-chaff-cutter')];
    expect(ModelPage.parse(long.body).positions.length).toBeGreaterThan(ModelPage.parse(short.body).positions.length);
    expect(long.count).toBe(short.count);
    expect(long.count).toBeLessThanOrEqual(20);
  });

  test('to a casting do not grow with its fitments', async () => {
    const [many, few] = [await counted('/api/castings/fensholt-f112'), await counted('/api/castings/brackwater-b3210')];
    expect(CastingPage.parse(many.body).fitments.length).toBeGreaterThan(CastingPage.parse(few.body).fitments.length);
    expect(many.count).toBe(few.count);
    expect(many.count).toBeLessThanOrEqual(25);
  });

  test.each(['makers', 'models', 'part-types', 'castings', 'ciphers', 'serial-ranges', 'sources'])('to a list of %s do not grow with it', async (noun) => {
    const [few, many] = [await counted(`/api/${noun}?limit=2`), await counted(`/api/${noun}?limit=100`)];
    // A relation that none of the few has is not asked for.
    expect(many.count).toBeLessThanOrEqual(few.count + 1);
  });

  test('to a serial do not grow with the maker’s series', async () => {
    const { count } = await counted('/api/models/brackwater-30-crawler/build?serial=3C1207');
    expect(count).toBeLessThanOrEqual(12);
  });
});
