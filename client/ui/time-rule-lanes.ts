import type { Day, DaySpan } from '#domain/dates/day.ts';
import { formatDay, formatSpan } from '#domain/dates/format-day.ts';
import type { Tone } from './verdict.tsx';

/** A stretch of time, either end of which may be open (null). */
export type Band = { readonly from: Day | null; readonly to: Day | null; readonly label?: string };

/** A date or span with its weight: how tall it stands. */
export type Tick = DaySpan & { readonly key: string; /** 0–1 */ readonly share: number; readonly tone: Tone | null; readonly label: string; /** Said in the table beside the date. */ readonly note?: string };

export type Lane =
  /** What was in use or made over a long time: a bar, with an arrow where it runs off the rule. */
  | { readonly kind: 'band'; readonly name: string; readonly bands: readonly Band[]; readonly look: 'outline' | 'filled' | 'hatched' }
  /** Dates with shares: ticks or, for spans, blocks. */
  | { readonly kind: 'ticks'; readonly name: string; readonly ticks: readonly Tick[] }
  /** The span everything else is held against: a block with guides the height of the rule. */
  | { readonly kind: 'window'; readonly name: string; readonly span: DaySpan; readonly likely?: Day; readonly label: string };

/** What a lane shows, for the table beside the drawing. */
export type LaneRow = { readonly key: string; readonly lane: string; readonly dates: string; readonly note: string };

export function laneRows(lanes: readonly Lane[]): LaneRow[] {
  return lanes.flatMap((lane): LaneRow[] => {
    switch (lane.kind) {
      case 'band':
        return lane.bands.map((band, place) => ({ key: `${lane.name} ${place}`, lane: lane.name, dates: sayBand(band), note: band.label ?? '' }));
      case 'ticks':
        return lane.ticks.map((tick) => ({ key: `${lane.name} ${tick.key}`, lane: lane.name, dates: formatSpan(tick), note: tick.note ?? '' }));
      case 'window':
        return [
          {
            key: lane.name,
            lane: lane.name,
            dates: formatSpan(lane.span),
            note: lane.likely === undefined ? '' : `most likely ${formatDay(lane.likely)}`,
          },
        ];
    }
  });
}

/** The days a band holds on a rule, or null where it lies wholly outside; `runsOff` says which ends go on beyond. */
export function clipBand(band: Band, rule: DaySpan): (DaySpan & { readonly runsOff: { readonly left: boolean; readonly right: boolean } }) | null {
  const from = Math.max(band.from ?? rule.from, rule.from);
  const to = Math.min(band.to ?? rule.to, rule.to);
  if (from > to) return null;
  return { from, to, runsOff: { left: band.from === null || band.from < rule.from, right: band.to === null || band.to > rule.to } };
}

function sayBand({ from, to }: Band): string {
  if (from !== null && to !== null) return formatSpan({ from, to });
  if (from !== null) return `from ${formatDay(from)}`;
  return to === null ? 'always' : `until ${formatDay(to)}`;
}
