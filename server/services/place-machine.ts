import type { Knex } from 'knex';
import { placeSerial } from '#domain/serials/build-window.ts';
import type { Placement, SerialPlace } from '#domain/serials/build-window.ts';
import { parseSerial } from '#domain/serials/serial.ts';
import type { ParsedSerial, SerialFault } from '#domain/serials/serial.ts';
import { MachineModel } from '#db/models/machine-model.ts';
import type { Anchor } from '#db/models/anchor.ts';
import { citedSources } from './fact-records.ts';
import type { CitedSource } from './fact-records.ts';
import { ProblemError } from './problem-error.ts';
import { preferredAccounts, searchable, serialRuns } from './serial-runs.ts';
import type { SerialRun } from './serial-runs.ts';

export type PlacedMachine = {
  readonly serial: ParsedSerial;
  readonly place: SerialPlace;
  /** Every run of the maker, those of other models included: what the placements name by id is among them. */
  readonly runs: readonly SerialRun[];
  /** The sources a placement rests on: its range, the anchors that narrowed it, or the ranges on either side. */
  readonly sourcesOf: (placement: Placement) => readonly CitedSource[];
};

/**
 * When a machine of a model was built, from its serial as stamped.
 *
 * @throws NotFoundError where no model has the slug; ProblemError `invalid` at `serial` for text that is no serial.
 */
export async function placeMachine({ slug, serial: text }: { readonly slug: string; readonly serial: string }, knex: Knex): Promise<PlacedMachine> {
  const model = await MachineModel.query(knex).findOne({ slug }).throwIfNotFound();
  const runs = await serialRuns({ makerId: model.makerId }, knex);
  const own = runs.filter(({ series }) => series.modelId === model.id);
  const elsewhere = runs.filter(({ series }) => series.modelId !== model.id);

  const serial = parseSerial(text, own.map(({ series }) => series.prefix));
  if (!serial.ok) {
    throw new ProblemError('invalid', 'See which, and why, under errors.', {
      errors: [{ path: ['serial'], message: messageOf(serial.fault, text) }],
    });
  }
  const place = placeSerial(serial.value, own.map(searchable), {
    elsewhere: elsewhere.map(searchable),
    preferredAccounts: preferredAccounts(own),
  });

  const grounds = new Map(place.placements.map((placement) => [placement, groundsOf(placement, serial.value.number, own)]));
  const sources = await citedSources([...new Set([...grounds.values()].flat())], knex);
  return {
    serial: serial.value,
    place,
    runs,
    sourcesOf: (placement) => (grounds.get(placement) ?? []).flatMap((id) => sources.get(id) ?? []),
  };
}

/** Ids of the facts a placement rests on. */
function groundsOf(placement: Placement, number: bigint, runs: readonly SerialRun[]): readonly string[] {
  const { range, window, below, above } = placement;
  if (range === null || window === null) return [below, above].flatMap((neighbour) => (neighbour ? [neighbour.id] : []));
  if (window.from === range.built.from && window.to === range.built.to) return [range.id];

  const credible = new Set(range.anchors.filter((anchor) => !placement.atOdds.includes(anchor)).map((anchor) => anchor.number));
  const anchors = runs
    .find(({ series }) => series.id === placement.seriesId)
    ?.anchors.filter((anchor) => credible.has(BigInt(anchor.number)));
  return [range.id, ...nearest(anchors ?? [], number).map(({ id }) => id)];
}

/** The dated machines next to a number, or the one of that very number. `anchors` ascend. */
function nearest(anchors: readonly Anchor[], number: bigint): readonly Anchor[] {
  const itself = anchors.find((anchor) => BigInt(anchor.number) === number);
  if (itself) return [itself];
  const below = anchors.findLast((anchor) => BigInt(anchor.number) < number);
  const above = anchors.find((anchor) => BigInt(anchor.number) > number);
  return [below, above].filter((anchor) => anchor !== undefined);
}

function messageOf({ code, at }: SerialFault, text: string): string {
  switch (code) {
    case 'too-long':
      return 'A serial has at most 40 characters';
    case 'not-a-glyph':
      return `${[...text][at] ?? ''} at place ${at + 1} is no letter, digit or separator`;
    case 'no-digits':
      return 'There is no number in it';
    case 'number-too-large':
      return 'The number is larger than any serial';
  }
}
