import { daysIn, overlap } from '../dates/day-span.ts';
import type { Day, DaySpan } from '../dates/day.ts';
import { parseSerial, plainPrefix, type ParsedSerial, type Substitution } from './serial.ts';

/**
 * Build window of a machine from its serial.
 *
 * A series is one run of numbers (model, prefix, works). A range belongs to a series and an account: first and last number, first
 * and last day of building. Ranges of one series and account share no number; rival accounts stand side by side, each with its
 * own answer.
 *
 * Inside a range of numbers first..last built over the n days [b0, b1], the window is [b0, b1] and the likely day of serial s is
 * b0 + floor((s − first + ½)/(last − first + 1) · n), if the numbers were issued in order. It is a sketch that assumes even
 * output, so it never comes without its window; an open last number gives a window and no day.
 *
 * Anchors are dated machines of the range. In a range issued in order they split it: between two anchors the window runs from the
 * first day of the earlier to the last day of the later, cut to the range's. A machine that is itself an anchor has the anchor's
 * days. Anchors that contradict the range or each other are set aside and named.
 */

export const RANGE_STANDINGS = ['solid', 'interpolated', 'conjectural'] as const;
export type RangeStanding = (typeof RANGE_STANDINGS)[number];

export const SERIAL_STANDINGS = ['in-range', 'gap', 'before-first', 'after-last', 'unknown-prefix'] as const;
export type SerialStanding = (typeof SERIAL_STANDINGS)[number];

/** A machine of a range whose days of building are known: a day, or the span its source allows. */
export type Anchor = { readonly number: bigint; readonly built: DaySpan };

export type SerialRange = {
  readonly id: string;
  readonly seriesId: string;
  readonly accountId: string;
  readonly first: bigint;
  /** `null`: nobody knows where the range ends. */
  readonly last: bigint | null;
  readonly built: DaySpan;
  /** Whether its source says that numbers were issued in order. */
  readonly inOrder: boolean;
  readonly standing: RangeStanding;
  readonly anchors: readonly Anchor[];
};

export type Series = { readonly id: string; readonly prefix: string; readonly ranges: readonly SerialRange[] };

/** What one account says of the serial in one series. */
export type Placement = {
  readonly seriesId: string;
  readonly accountId: string;
  readonly standing: Exclude<SerialStanding, 'unknown-prefix'>;
  /** `null` unless in range. */
  readonly window: DaySpan | null;
  /** Always inside `window`. */
  readonly likely: Day | null;
  readonly range: SerialRange | null;
  /** The nearest ranges of the account on either side; both in a gap, one outside the known numbers, none in range. */
  readonly below: SerialRange | null;
  readonly above: SerialRange | null;
  /** Anchors of the range that could not be used because they contradict it or each other. */
  readonly atOdds: readonly Anchor[];
};

/** Another series in which the same text can be a number on record. */
export type AlikeSeries = {
  readonly seriesId: string;
  readonly number: bigint;
  readonly ranges: readonly SerialRange[];
  readonly substitutions: readonly Substitution[];
};

export type SerialPlace = {
  /** That of the first placement; `unknown-prefix` where no series with a known range carries the prefix. */
  readonly standing: SerialStanding;
  /**
   * One a series and account. The series that hold the number come first, and within a series the preferred account: the first
   * placement is the register's reading.
   */
  readonly placements: readonly Placement[];
  readonly readsAlike: readonly AlikeSeries[];
};

export type PlaceOptions = {
  /** Other series of the maker, searched only for numbers that read alike. */
  readonly elsewhere?: readonly Series[];
  /** Accounts the register prefers, the best first; the others follow in the order of their ranges. */
  readonly preferredAccounts?: readonly string[];
};

/** Places a serial among the series of its model. */
export function placeSerial(serial: ParsedSerial, series: readonly Series[], options: PlaceOptions = {}): SerialPlace {
  const own = series.filter((one) => plainPrefix(one.prefix) === serial.prefix);
  const bySeries = own
    .map((one) => placementsIn(one, serial.number, options.preferredAccounts ?? []))
    .toSorted((one, other) => rankOf(one) - rankOf(other));
  const placements = bySeries.flat();
  return {
    standing: placements[0]?.standing ?? 'unknown-prefix',
    placements,
    readsAlike: [...series, ...(options.elsewhere ?? [])]
      .filter((one) => !own.includes(one))
      .flatMap((one) => alikeIn(one, serial)),
  };
}

/**
 * Places among the series in the order of what their preferred account says; one without ranges says nothing and does not matter.
 */
function rankOf(placements: readonly Placement[]): number {
  const [preferred] = placements;
  return preferred === undefined ? SERIAL_STANDINGS.length : SERIAL_STANDINGS.indexOf(preferred.standing);
}

function placementsIn(series: Series, number: bigint, preferred: readonly string[]): readonly Placement[] {
  const accounts = [...new Set(series.ranges.map((range) => range.accountId))];
  const inOrder = [
    ...preferred.filter((account) => accounts.includes(account)),
    ...accounts.filter((account) => !preferred.includes(account)),
  ];
  return inOrder.map((accountId) => {
    const ranges = series.ranges.filter((range) => range.accountId === accountId);
    return { seriesId: series.id, accountId, ...placeAmong(ranges, number) };
  });
}

function placeAmong(ranges: readonly SerialRange[], number: bigint): Omit<Placement, 'seriesId' | 'accountId'> {
  const range = ranges.find((one) => holds(one, number));
  if (range !== undefined) return { standing: 'in-range', range, below: null, above: null, ...windowIn(range, number) };
  // Ranges of one account share no number, so the order of their first numbers is the order of the ranges.
  const ascending = ranges.toSorted((one, other) => (one.first < other.first ? -1 : 1));
  const below = ascending.findLast((one) => one.first < number) ?? null;
  const above = ascending.find((one) => one.first > number) ?? null;
  const standing = below === null ? 'before-first' : above === null ? 'after-last' : 'gap';
  return { standing, window: null, likely: null, range: null, below, above, atOdds: [] };
}

function holds(range: SerialRange, number: bigint): boolean {
  return range.first <= number && (range.last === null || number <= range.last);
}

function windowIn(range: SerialRange, number: bigint): Pick<Placement, 'window' | 'likely' | 'atOdds'> {
  const credible = range.anchors.filter((anchor) => holds(range, anchor.number) && overlap(anchor.built, range.built) !== null);
  const strays = range.anchors.filter((anchor) => !credible.includes(anchor));

  const itself = nearestTo(
    number,
    credible.filter((anchor) => anchor.number === number),
  );
  if (itself !== null) {
    const window = overlap(itself.built, range.built) ?? range.built;
    return { window, likely: window.from === window.to ? window.from : null, atOdds: strays };
  }
  if (!range.inOrder) return { window: range.built, likely: null, atOdds: strays };

  const earlier = nearestTo(
    number,
    credible.filter((anchor) => anchor.number < number),
  );
  const later = nearestTo(
    number,
    credible.filter((anchor) => anchor.number > number),
  );
  const between = { from: earlier?.built.from ?? range.built.from, to: later?.built.to ?? range.built.to };
  const window = overlap(between, range.built);
  if (window === null) {
    const likely = likelyDay(number, range.first, range.last, range.built);
    return { window: range.built, likely, atOdds: [...strays, ...(earlier?.anchors ?? []), ...(later?.anchors ?? [])] };
  }
  return {
    window,
    likely: likelyDay(number, earlier?.number ?? range.first, later?.number ?? range.last, window),
    atOdds: strays,
  };
}

/** The anchors nearest to a number; several of the same number are taken together, over all the days any of them allows. */
function nearestTo(number: bigint, anchors: readonly Anchor[]): (Anchor & { readonly anchors: readonly Anchor[] }) | null {
  const distance = (anchor: Anchor): bigint => (anchor.number < number ? number - anchor.number : anchor.number - number);
  const [closest] = anchors.toSorted((one, other) => (distance(one) < distance(other) ? -1 : 1));
  if (closest === undefined) return null;
  const together = anchors.filter((anchor) => anchor.number === closest.number);
  const built = {
    from: Math.min(...together.map((anchor) => anchor.built.from)),
    to: Math.max(...together.map((anchor) => anchor.built.to)),
  };
  return { number: closest.number, built, anchors: together };
}

/** `number` is the middle of its own share of the days: reckoned in halves, so that integers carry it exactly. */
function likelyDay(number: bigint, first: bigint, last: bigint | null, window: DaySpan): Day | null {
  if (last === null) return null;
  const days = BigInt(daysIn(window));
  return window.from + Number(((2n * (number - first) + 1n) * days) / (2n * (last - first + 1n)));
}

function alikeIn(series: Series, serial: ParsedSerial): readonly AlikeSeries[] {
  const reading = parseSerial(serial.asStamped, [series.prefix]);
  if (!reading.ok || reading.value.prefix !== plainPrefix(series.prefix)) return [];
  const { number, substitutions } = reading.value;
  const ranges = series.ranges.filter((range) => holds(range, number));
  return ranges.length === 0 ? [] : [{ seriesId: series.id, number, ranges, substitutions }];
}
