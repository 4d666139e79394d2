import type { SerialRangeItem, SerialRangePage, SeriesRef } from '#contract/serial-ranges.ts';
import type { SerialRange } from '#db/models/serial-range.ts';
import type { Series } from '#db/models/series.ts';
import type { SerialRangeOnRecord } from '#server/services/read-serial-range.ts';
import { presentNamed, presentProvenance } from './common.ts';
import { loaded } from './loaded.ts';

export type RangeHeld = Omit<SerialRangeItem, 'model' | 'series' | 'account' | 'preferred'>;

export function presentSeriesRef({ id, prefix, works, label }: Series): SeriesRef {
  return { id, prefix, works: works?.name ?? null, label };
}

/** What a range says by itself. */
export function presentRangeHeld({ id, slug, numbers, built, precision, meaning, standing, inOrder }: SerialRange): RangeHeld {
  return { id, slug, first: numbers.from, last: numbers.to, dates: { from: built.from, to: built.to }, precision, meaning, standing, inOrder };
}

/** A range among those of its series. */
export function presentSerialRangeItem(range: SerialRange, series: Series): SerialRangeItem {
  const account = loaded(range.account);
  return {
    ...presentRangeHeld(range),
    model: presentNamed(loaded(series.model)),
    series: presentSeriesRef(series),
    account: { id: account.id, title: account.title },
    preferred: loaded(series.seriesAccounts).some(({ accountId, preferred }) => preferred && accountId === range.accountId),
  };
}

export function presentSerialRange({ range, record }: SerialRangeOnRecord): SerialRangePage {
  const series = loaded(range.series);
  return {
    ...presentSerialRangeItem(range, series),
    maker: presentNamed(loaded(loaded(series.model).maker)),
    note: range.note,
    provenance: presentProvenance(record),
  };
}
