import type { BuildAnswer } from '#contract/models.ts';
import { writeDay } from '#domain/dates/day.ts';
import type { DaySpan } from '#domain/dates/day.ts';
import type { AlikeSeries, Placement } from '#domain/serials/build-window.ts';
import type { SerialRange } from '#db/models/serial-range.ts';
import type { PlacedMachine } from '#server/services/place-machine.ts';
import type { SerialRun } from '#server/services/serial-runs.ts';
import { presentFactSource, presentNamed } from './common.ts';
import { loaded } from './loaded.ts';
import { presentRangeHeld, presentSeriesRef } from './serial-range.ts';

type Account = BuildAnswer['accounts'][number];
type Placing = Omit<Account, 'series' | 'account' | 'preferred'>;

const NOTHING_KNOWN: Placing = { window: null, likely: null, range: null, standing: 'unknown-prefix', neighbours: [], sources: [] };

export function presentBuild(placed: PlacedMachine): BuildAnswer {
  const { serial, place } = placed;
  const accounts = place.placements.map((placement) => presentAccount(placement, placed));
  const [first] = place.placements;
  return {
    serial: {
      asStamped: serial.asStamped,
      prefix: serial.prefix,
      number: String(serial.number),
      suffix: serial.suffix,
      substitutions: serial.substitutions.map(({ at, seen, taken }) => ({ at, seen, taken })),
    },
    ...(first ? presentPlacing(first, placed) : NOTHING_KNOWN),
    accounts,
    readsAlike: place.readsAlike.map((alike) => presentAlike(alike, placed.runs)),
  };
}

function presentAccount(placement: Placement, placed: PlacedMachine): Account {
  const run = runOf(placement.seriesId, placed.runs);
  const seriesAccounts = loaded(run.series.seriesAccounts);
  const account = loaded(run.ranges.find(({ accountId }) => accountId === placement.accountId)?.account);
  return {
    series: presentSeriesRef(run.series),
    account: { id: account.id, title: account.title },
    preferred: seriesAccounts.some(({ accountId, preferred }) => preferred && accountId === placement.accountId),
    ...presentPlacing(placement, placed),
  };
}

function presentPlacing(placement: Placement, { runs, sourcesOf }: PlacedMachine): Placing {
  const { window, likely, range, standing, below, above } = placement;
  const { ranges } = runOf(placement.seriesId, runs);
  return {
    window: window && presentSpan(window),
    likely: window && likely !== null ? { day: writeDay(likely), ...presentSpan(window) } : null,
    range: range && presentRangeHeld(rangeOf(range.id, ranges)),
    standing,
    neighbours: [below, above].flatMap((neighbour) => (neighbour ? [presentRangeHeld(rangeOf(neighbour.id, ranges))] : [])),
    sources: sourcesOf(placement).map(presentFactSource),
  };
}

function presentAlike({ seriesId, ranges }: AlikeSeries, runs: readonly SerialRun[]): BuildAnswer['readsAlike'][number] {
  const { series } = runOf(seriesId, runs);
  return {
    model: presentNamed(loaded(series.model)),
    series: presentSeriesRef(series),
    window: presentSpan({
      from: Math.min(...ranges.map(({ built }) => built.from)),
      to: Math.max(...ranges.map(({ built }) => built.to)),
    }),
  };
}

function presentSpan({ from, to }: DaySpan): { from: string; to: string } {
  return { from: writeDay(from), to: writeDay(to) };
}

function runOf(seriesId: string, runs: readonly SerialRun[]): SerialRun {
  return loaded(runs.find(({ series }) => series.id === seriesId));
}

function rangeOf(id: string, ranges: readonly SerialRange[]): SerialRange {
  return loaded(ranges.find((range) => range.id === id));
}
