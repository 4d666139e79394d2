import { writeDay } from '#domain/dates/day.ts';
import type { DaySpan } from '#domain/dates/day.ts';
import { placeSerial } from '#domain/serials/build-window.ts';
import type { SerialRange } from '#domain/serials/build-window.ts';
import { parseSerial } from '#domain/serials/serial.ts';
import type { Fitment } from '#db/models/fitment.ts';
import { preferredAccounts, searchable } from './serial-runs.ts';
import type { SerialRun } from './serial-runs.ts';

export type OpenDays = { readonly from: string | null; readonly to: string | null };

/**
 * When the machines a fitment speaks of were built, by the register's reading: from the window of its first number to that of its last,
 * and of every range between. `null` where no range says anything.
 */
export function builtBetween(fitment: Pick<Fitment, 'modelId' | 'seriesId' | 'numbers'>, runs: readonly SerialRun[]): OpenDays | null {
  const own = runs.filter(({ series }) => series.modelId === fitment.modelId && (fitment.seriesId === null || series.id === fitment.seriesId));
  const spans = own.flatMap((run) => windowsOf(run, fitment.numbers));
  if (spans.length === 0) return null;
  return { from: writeDay(Math.min(...spans.map(({ from }) => from))), to: writeDay(Math.max(...spans.map(({ to }) => to))) };
}

/** The windows of the numbers in each range of the account the series goes by. */
function windowsOf(run: SerialRun, numbers: Fitment['numbers']): readonly DaySpan[] {
  const { ranges } = searchable(run);
  const preferred = preferredAccounts([run])[0] ?? ranges[0]?.accountId;
  const first = numbers.from === null ? null : BigInt(numbers.from);
  const last = numbers.to === null ? null : BigInt(numbers.to);
  return ranges
    .filter(({ accountId }) => accountId === preferred)
    .filter((range) => (last === null || range.first <= last) && (first === null || range.last === null || first <= range.last))
    .map((range) => ({
      from: first === null || first <= range.first ? range.built.from : windowIn(range, run, first).from,
      to: last === null || (range.last !== null && range.last <= last) ? range.built.to : windowIn(range, run, last).to,
    }));
}

function windowIn(range: SerialRange, { series }: SerialRun, number: bigint): DaySpan {
  const serial = parseSerial(`${series.prefix}${number}`, [series.prefix]);
  if (!serial.ok) return range.built;
  const [placement] = placeSerial(serial.value, [{ id: series.id, prefix: series.prefix, ranges: [range] }]).placements;
  return placement?.window ?? range.built;
}
