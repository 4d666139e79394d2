import type { Knex } from 'knex';
import { z } from 'zod';
import type { Day } from '#domain/dates/day.ts';
import { dayOnRecord } from './day-on-record.ts';

const Rows = z.object({ rows: z.tuple([z.object({ today: z.string() })]) });

/** Today by the database's clock, UTC: the same for every server that asks it. */
export async function today(knex: Knex): Promise<Day> {
  const answer: unknown = await knex.raw('select current_date as today');
  return dayOnRecord(Rows.parse(answer).rows[0].today);
}
