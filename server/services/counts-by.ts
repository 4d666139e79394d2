import type { Knex } from 'knex';
import { z } from 'zod';

const Counts = z.array(z.object({ owner: z.string(), count: z.string() }));

/** How many rows of a table belong to each owner; an owner of none is left out. */
export async function countsBy(
  { table, owner }: { readonly table: string; readonly owner: string },
  ids: readonly string[],
  knex: Knex,
): Promise<ReadonlyMap<string, number>> {
  const rows: unknown = await knex(table)
    .select({ owner })
    .count({ count: '*' })
    .whereIn(owner, [...ids])
    .groupBy(owner);
  return new Map(Counts.parse(rows).map((row) => [row.owner, Number(row.count)]));
}
