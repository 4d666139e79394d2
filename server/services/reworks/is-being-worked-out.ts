import type { Knex } from 'knex';
import { Rework } from '#db/models/rework.ts';

/** Whose parts, and on machines of which models, a page shows. */
export type Touched = { readonly makers: readonly string[]; readonly models: readonly string[] };

/**
 * Whether marks and fits of these are being worked out again: then a page says so and shows no figures, as some would be of before and
 * some of after. Holds for a rework that failed too, until one is done. A part of no known maker rests on every maker.
 */
export async function isBeingWorkedOut({ makers, models }: Touched, knex: Knex): Promise<boolean> {
  const query = Rework.query(knex).whereNot({ state: 'done' });
  void query.where((any) => {
    if (makers.length === 0) void any.whereRaw('cardinality(makers) > 0');
    else void any.whereRaw('makers && ?::uuid[]', [[...makers]]);
    if (models.length > 0) void any.orWhereRaw('models && ?::uuid[]', [[...models]]);
  });
  return (await query.resultSize()) > 0;
}
