import type { Knex } from 'knex';
import { z } from 'zod';

const Latest = z.array(z.object({ factId: z.string(), number: z.number() }));

/** The number of the latest version of each fact, whether it is in force or was retired. */
export async function latestVersions(factIds: readonly string[], knex: Knex): Promise<ReadonlyMap<string, number>> {
  const rows: unknown = await knex('entered_versions').whereIn('factId', [...factIds]).groupBy('factId').select('factId').max({ number: 'number' });
  return new Map(Latest.parse(rows).map(({ factId, number }) => [factId, number]));
}
