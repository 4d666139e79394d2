import { z } from 'zod';
import { RANGE_STANDINGS } from '#domain/serials/build-window.ts';
import { DATE_MEANINGS, DATE_PRECISIONS } from '#domain/vocabulary.ts';
import { BySlug, DateSpan, History, Id, listAnswer, listQuery, Named, Provenance, Slug, WholeNumber } from './common.ts';
import { endpoint } from './endpoint.ts';

export const SeriesRef = z.object({
  id: Id,
  prefix: z.string(),
  works: z.string().nullable(),
  /** Tells runs of one prefix apart where the numbers restarted. */
  label: z.string().nullable(),
});
export type SeriesRef = z.infer<typeof SeriesRef>;

export const AccountRef = z.object({ id: Id, title: z.string() });

export const SerialRangeItem = z.object({
  id: Id,
  slug: Slug,
  model: Named,
  series: SeriesRef,
  account: AccountRef,
  /** The account the register goes by where several stand side by side. */
  preferred: z.boolean(),
  first: WholeNumber,
  /** Null while the last number is not known. */
  last: WholeNumber.nullable(),
  dates: DateSpan,
  precision: z.enum(DATE_PRECISIONS),
  meaning: z.enum(DATE_MEANINGS),
  standing: z.enum(RANGE_STANDINGS),
  inOrder: z.boolean(),
});
export type SerialRangeItem = z.infer<typeof SerialRangeItem>;

export const SerialRangePage = SerialRangeItem.extend({ maker: Named, note: z.string().nullable(), provenance: Provenance });
export type SerialRangePage = z.infer<typeof SerialRangePage>;

export const listSerialRanges = endpoint({
  method: 'GET',
  path: '/serial-ranges',
  summary: 'Serial ranges, by series and first number',
  query: listQuery(['series', 'dates', '-dates'], { model: Slug.optional(), maker: Slug.optional() }),
  answer: listAnswer(SerialRangeItem),
});
export const readSerialRange = endpoint({
  method: 'GET',
  path: '/serial-ranges/:slug',
  summary: 'One serial range',
  params: BySlug,
  answer: SerialRangePage,
});
export const readSerialRangeHistory = endpoint({
  method: 'GET',
  path: '/serial-ranges/:slug/history',
  summary: 'Every version of a serial range',
  params: BySlug,
  answer: History,
});
