import { describe, expect, test } from 'vitest';
import { checkReadiness } from '#server/services/check-readiness.ts';
import { useDatabase } from '#tests/support/database.ts';

const database = useDatabase();
const ALIVE = { isAlive: () => true };
const WRITABLE = { isWritable: () => Promise.resolve(true) };

describe('readiness', () => {
  test('holds while jobs are being worked off', async () => {
    await expect(checkReadiness({ knex: database.knex, jobs: ALIVE, store: WRITABLE })).resolves.toBeUndefined();
  });

  test('is lost while they stand still, although requests could be answered', async () => {
    await expect(checkReadiness({ knex: database.knex, jobs: { isAlive: () => false }, store: WRITABLE })).rejects.toMatchObject({ kind: 'unavailable' });
  });

  test('is lost while no photo could be kept', async () => {
    const store = { isWritable: () => Promise.resolve(false) };
    await expect(checkReadiness({ knex: database.knex, jobs: ALIVE, store })).rejects.toMatchObject({ kind: 'unavailable', detail: expect.stringMatching(/^Photos/) as unknown });
  });
});
