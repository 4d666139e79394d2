import { describe, expect, test } from 'vitest';
import { checkReadiness } from '#server/services/check-readiness.ts';
import { useDatabase } from '#tests/support/database.ts';

const database = useDatabase();

describe('readiness', () => {
  test('holds while jobs are being worked off', async () => {
    await expect(checkReadiness(database.knex, { isAlive: () => true })).resolves.toBeUndefined();
  });

  test('is lost while they stand still, although requests could be answered', async () => {
    await expect(checkReadiness(database.knex, { isAlive: () => false })).rejects.toMatchObject({ kind: 'unavailable' });
  });
});
