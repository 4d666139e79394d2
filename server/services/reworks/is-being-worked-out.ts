import type { Knex } from 'knex';
import { Rework } from '#db/models/rework.ts';

/** Whose parts, and on machines of which models, a page shows. */
export type Touched = { readonly makers: readonly string[]; readonly models: readonly string[] };

/**
 * Whether marks and fits of these are being worked out again: then a page says so and shows no figures, as some would be of before and
 * some of after. Holds for a rework that failed too, until one is done. A part of no known maker rests on every maker.
 */
export async function isBeingWorkedOut(touched: Touched, knex: Knex): Promise<boolean> {
  return (await whatIsBeingWorkedOut(knex))(touched);
}

/** The same for all that is on one page, asked of the database once. */
export async function whatIsBeingWorkedOut(knex: Knex): Promise<(touched: Touched) => boolean> {
  const unfinished = await Rework.query(knex).whereNot({ state: 'done' }).select('makers', 'models');
  const makers = new Set(unfinished.flatMap((rework) => rework.makers));
  const models = new Set(unfinished.flatMap((rework) => rework.models));
  return (touched) =>
    (touched.makers.length === 0 ? makers.size > 0 : touched.makers.some((id) => makers.has(id))) || touched.models.some((id) => models.has(id));
}
