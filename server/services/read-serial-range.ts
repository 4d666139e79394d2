import type { Knex } from 'knex';
import { SerialRange } from '#db/models/serial-range.ts';
import { factRecords } from './fact-records.ts';
import type { FactRecord } from './fact-records.ts';

export type SerialRangeOnRecord = { readonly range: SerialRange; readonly record: FactRecord };

/** @throws NotFoundError where no serial range has the slug. */
export async function readSerialRange(slug: string, knex: Knex): Promise<SerialRangeOnRecord> {
  const range = await SerialRange.query(knex)
    .findOne({ slug })
    .withGraphFetched('[series.[model.maker, works, seriesAccounts], account]')
    .throwIfNotFound();
  const records = await factRecords([range.id], knex);
  return { range, record: records.of(range.id) };
}
