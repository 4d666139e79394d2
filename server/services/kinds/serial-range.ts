import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import { Account } from '#db/models/account.ts';
import { SerialRange } from '#db/models/serial-range.ts';
import { SeriesAccount } from '#db/models/series-account.ts';
import { Series } from '#db/models/series.ts';
import { Source } from '#db/models/source.ts';
import { nameOf, titleOf } from '../facts/name-of.ts';
import { freeSlug } from './free-slug.ts';
import type { KindModule, Writing } from './kind-module.ts';
import { serialRangeEvidence } from './serial-range-evidence.ts';
import { removeRow, writeRow } from './write-row.ts';

export const serialRange: KindModule<'serial-range'> = {
  kind: 'serial-range',
  belongsBy: 'modelId',
  titleOf: async ({ seriesId, numbers }, knex) => `${await titleOf(seriesId, knex)}, ${BigInt(numbers.from)} to ${numbers.to ?? 'the last'}`,
  makerOf: async ({ seriesId }, knex) => (await nameOf(seriesId, knex))?.makerId ?? null,
  write: async (payload, writing, trx) => {
    const { seriesId, numbers } = payload;
    const accountId = payload.accountId ?? (await accountOfFirstSource(writing, trx));
    await speakOf(seriesId, accountId, trx);
    let { slug } = writing;
    if (slug === null) {
      const series = await Series.query(trx).findById(seriesId).withGraphFetched('model').throwIfNotFound();
      const text = [series.model?.slug ?? '', series.prefix, numbers.from, numbers.to ?? 'on'].join(' ');
      slug = await freeSlug({ table: 'serial_ranges', text }, trx);
    }
    await writeRow(SerialRange, writing, { ...payload, accountId, slug }, trx);
    return slug;
  },
  refusals: {
    serial_ranges_no_overlap: { path: ['numbers'], message: 'The same account says otherwise of some of these numbers' },
    series_accounts_account_id_fkey: { path: ['accountId'], message: 'No account of this name' },
  },
  remove: (factId, trx) => removeRow(SerialRange, factId, trx),
  gather: serialRangeEvidence,
  restsOn: async ({ seriesId }, knex) => {
    const modelId = (await nameOf(seriesId, knex))?.modelId;
    return { makers: [], models: modelId ? [modelId] : [] };
  },
};

/** Every source gives one account; it is entered the first time a range is told from it. */
async function accountOfFirstSource({ sourceIds: [sourceId] }: Writing, trx: Knex.Transaction): Promise<string> {
  if (sourceId === undefined) throw new RangeError('A range without a source: it was to be refused before');
  const known = await Account.query(trx).where({ sourceId }).orderBy('id').first();
  if (known) return known.id;
  const { title } = await Source.query(trx).findById(sourceId).throwIfNotFound();
  const slug = await freeSlug({ table: 'accounts', text: title }, trx);
  return (await Account.query(trx).insert({ id: uuidV7(), slug, title, sourceId })).id;
}

/** Has the account speak of the series. The first that does is the register's reading until a moderator marks another. */
async function speakOf(seriesId: string, accountId: string, trx: Knex.Transaction): Promise<void> {
  const others = await SeriesAccount.query(trx).where({ seriesId });
  if (others.some((one) => one.accountId === accountId)) return;
  await SeriesAccount.query(trx).insert({ seriesId, accountId, preferred: others.length === 0 });
}
