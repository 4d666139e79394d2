import type { SerialRangeItem } from '#contract/serial-ranges.ts';
import { saySpan } from '../../lib/say-date.ts';

const STANDINGS: Readonly<Record<SerialRangeItem['standing'], string>> = {
  solid: 'solid',
  interpolated: 'interpolated between known numbers',
  conjectural: 'conjectural',
};

const MEANINGS: Readonly<Record<SerialRangeItem['meaning'], string>> = {
  built: 'built',
  dispatched: 'dispatched',
  sold: 'sold',
  'model-year': 'of model year',
};

const PRECISIONS: Readonly<Record<SerialRangeItem['precision'], string>> = {
  day: 'to the day',
  month: 'to the month',
  year: 'to the year',
};

export function sayRangeStanding(standing: SerialRangeItem['standing']): string {
  return STANDINGS[standing];
}

/** What its days are days of: only `built` dates the building. */
export function sayMeaning(meaning: SerialRangeItem['meaning']): string {
  return MEANINGS[meaning];
}

export function sayPrecision(precision: SerialRangeItem['precision']): string {
  return PRECISIONS[precision];
}

/** `Aug 1938 – Aug 1941`, or with what the days are where they are not days of building: `dispatched 3–9 Mar 1939`. */
export function sayRangeDates({ meaning, dates }: Pick<SerialRangeItem, 'meaning' | 'dates'>): string {
  return meaning === 'built' ? saySpan(dates) : `${MEANINGS[meaning]} ${saySpan(dates)}`;
}
