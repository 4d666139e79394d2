import type { Knex } from 'knex';
import type { DaySpan } from '#domain/dates/day.ts';
import { placeSerial } from '#domain/serials/build-window.ts';
import { parseSerial, plainPrefix } from '#domain/serials/serial.ts';
import { preferredAccounts, searchable, serialRuns } from '#server/services/serial-runs.ts';
import type { SerialRun } from '#server/services/serial-runs.ts';
import { remembering } from './mark-dating.ts';

/** A machine on record, as far as it says when it was built. */
export type SerialOnRecord = { readonly modelId: string; readonly serialAsStamped: string };

export type MachinePlace = {
  /** By the register's reading: the account each series goes by; `null` where no range holds the number. */
  readonly window: DaySpan | null;
  /** `null`: no series of the model has the prefix, or several do and none holds the number. */
  readonly seriesId: string | null;
  readonly number: bigint | null;
};

const NOWHERE: MachinePlace = { window: null, seriesId: null, number: null };

/** Loads what is known of the serials of some models, once; then places any number of their machines. */
export async function placingMachines(modelIds: readonly string[], knex: Knex): Promise<(machine: SerialOnRecord) => MachinePlace> {
  const models = [...new Set(modelIds)];
  const runs = await serialRuns({ modelIds: models }, knex);
  const placers = new Map(models.map((modelId) => [modelId, remembering(placingOn(runs.filter(({ series }) => series.modelId === modelId)))]));
  return ({ modelId, serialAsStamped }) => placers.get(modelId)?.(serialAsStamped) ?? NOWHERE;
}

function placingOn(runs: readonly SerialRun[]): (serialAsStamped: string) => MachinePlace {
  const series = runs.map(searchable);
  const prefixes = series.map(({ prefix }) => prefix);
  const preferred = preferredAccounts(runs);
  return (serialAsStamped) => {
    const serial = parseSerial(serialAsStamped, prefixes);
    if (!serial.ok) return NOWHERE;
    const { number, prefix } = serial.value;
    const [first] = placeSerial(serial.value, series, { preferredAccounts: preferred }).placements;
    if (first?.standing === 'in-range') return { window: first.window, seriesId: first.seriesId, number };
    const [only, ...others] = series.filter((one) => plainPrefix(one.prefix) === prefix);
    return { window: null, seriesId: others.length === 0 ? (only?.id ?? null) : null, number };
  };
}
