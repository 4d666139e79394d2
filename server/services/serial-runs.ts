import type { Knex } from 'knex';
import type { Series as SeriesToSearch, SerialRange as RangeToSearch } from '#domain/serials/build-window.ts';
import { Anchor } from '#db/models/anchor.ts';
import { SerialRange } from '#db/models/serial-range.ts';
import { Series } from '#db/models/series.ts';
import { spanOnRecord } from './day-on-record.ts';

/** A series with what is known of when its numbers were built: the only meaning of a date that gives a build window. */
export type SerialRun = { readonly series: Series; readonly ranges: readonly SerialRange[]; readonly anchors: readonly Anchor[] };

/** Loads the runs a query of series finds, in seven queries however many they are. */
export async function serialRuns(narrow: { readonly makerId: string } | { readonly modelIds: readonly string[] }, knex: Knex): Promise<readonly SerialRun[]> {
  const query = Series.query(knex).orderBy(['prefix', 'label', 'id']).withGraphFetched('[model, works, seriesAccounts]');
  const series = await ('makerId' in narrow ? query.where({ makerId: narrow.makerId }) : query.whereIn('modelId', [...narrow.modelIds]));
  const ids = series.map(({ id }) => id);
  const ranges = await SerialRange.query(knex)
    .whereIn('seriesId', ids)
    .where({ meaning: 'built' })
    .orderBy(['numbers', 'id'])
    .withGraphFetched('account');
  const anchors = await Anchor.query(knex).whereIn('seriesId', ids).where({ meaning: 'built' }).orderBy(['number', 'id']);
  return series.map((one) => ({
    series: one,
    ranges: ranges.filter(({ seriesId }) => seriesId === one.id),
    anchors: anchors.filter(({ seriesId }) => seriesId === one.id),
  }));
}

/** A run as the domain searches it. An anchor belongs to the series, so it stands in every range that holds its number. */
export function searchable({ series, ranges, anchors }: SerialRun): SeriesToSearch {
  return { id: series.id, prefix: series.prefix, ranges: ranges.map((range) => searchableRange(range, anchors)) };
}

/** The account a series goes by where several stand side by side. */
export function preferredAccounts(runs: readonly SerialRun[]): readonly string[] {
  return runs.flatMap(({ series }) => (series.seriesAccounts ?? []).filter(({ preferred }) => preferred).map(({ accountId }) => accountId));
}

function searchableRange(range: SerialRange, anchors: readonly Anchor[]): RangeToSearch {
  const first = BigInt(range.numbers.from);
  const last = range.numbers.to === null ? null : BigInt(range.numbers.to);
  const known = anchors.map(({ number, built }) => ({ number: BigInt(number), built: spanOnRecord(built) }));
  return {
    id: range.id,
    seriesId: range.seriesId,
    accountId: range.accountId,
    first,
    last,
    built: spanOnRecord(range.built),
    inOrder: range.inOrder,
    standing: range.standing,
    anchors: known.filter(({ number }) => first <= number && (last === null || number <= last)),
  };
}
