import type { Knex } from 'knex';
import { FactName } from '#db/models/fact-name.ts';
import type { Machine } from '#db/models/machine.ts';
import type { Maker } from '#db/models/maker.ts';
import { Mark } from '#db/models/mark.ts';
import { PartFitting } from '#db/models/part-fitting.ts';
import { isHidden } from '#server/policies/marks.ts';
import type { Acquaintance } from '#server/policies/marks.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { whatIsBeingWorkedOut } from '#server/services/reworks/is-being-worked-out.ts';
import { acquaintances } from './acquaintances.ts';

/** A mark as one viewer sees it. */
export type MarkInView = {
  readonly viewer: Viewer;
  /** With its photos, its part and machine, and what it was worked out to mean. */
  readonly mark: Mark;
  readonly acquaintance: Acquaintance;
  /** Nothing of what others read, of what it means and of what it stands on is for the viewer yet. */
  readonly isHidden: boolean;
  readonly maker: Maker | null;
  /** The catalogue's entry its part was identified as. */
  readonly casting: FactName | null;
  /** The machine it is on; `null`: on none, or on one that is not for the viewer to know of. */
  readonly machine: Machine | null;
  /** Whether what it means is not being worked out again. */
  readonly isWorkedOut: boolean;
};

export const MARK_GRAPH = '[part.[partType, maker, casting.[maker]], machine.model, decoding, photos.photo.picture.files]';

/** Marks by id, in any order; whether the viewer may see them is the caller's to know. */
export async function loadMarks(ids: readonly string[], viewer: Viewer, knex: Knex): Promise<readonly MarkInView[]> {
  const marks = await Mark.query(knex).findByIds([...ids]).withGraphFetched(MARK_GRAPH);
  return marks.map(await viewOf(marks, viewer, knex));
}

/** How the viewer sees each of some marks with `MARK_GRAPH`. */
export async function viewOf(marks: readonly Mark[], viewer: Viewer, knex: Knex): Promise<(mark: Mark) => MarkInView> {
  const acquaintanceWith = await acquaintances(viewer, marks, knex);
  const fittings = await fittingsNow(marks.flatMap(({ partId }) => partId ?? []), knex);
  const castings = await namesOf(marks.map(({ part }) => part?.castingId), knex);
  const isBeingWorkedOut = await whatIsBeingWorkedOut(knex);
  return (mark) => {
    const { part, kind } = mark;
    const machine = mark.machine ?? fittings.get(part?.id ?? '')?.machine ?? null;
    const maker = part?.casting?.maker ?? part?.maker ?? null;
    const makers = [maker?.id, part?.casting?.pouredById].flatMap((one) => one ?? []);
    const acquaintance = acquaintanceWith(mark);
    return {
      viewer,
      mark,
      acquaintance,
      isHidden: isHidden(viewer, acquaintance),
      maker,
      casting: castings.get(part?.castingId ?? '') ?? null,
      machine: machine !== null && mayKnowMachine(viewer, machine) ? machine : null,
      isWorkedOut: kind !== 'date-code' || !isBeingWorkedOut({ makers, models: machine === null ? [] : [machine.modelId] }),
    };
  };
}

/** Where each of some parts is now, with machine, model and position. */
export async function fittingsNow(partIds: readonly string[], knex: Knex): Promise<ReadonlyMap<string, PartFitting>> {
  const fittings = await PartFitting.query(knex).whereIn('partId', [...partIds]).whereRaw('upper_inf(fitted)').withGraphFetched('[machine.model, position]');
  return new Map(fittings.map((fitting) => [fitting.partId, fitting]));
}

/** What facts are called, by id. */
export async function namesOf(factIds: readonly (string | null | undefined)[], knex: Knex): Promise<ReadonlyMap<string, FactName>> {
  const ids = [...new Set(factIds.flatMap((id) => id ?? []))];
  const names = ids.length === 0 ? [] : await FactName.query(knex).whereIn('id', ids);
  return new Map(names.map((name) => [name.id, name]));
}

export function mayKnowMachine(viewer: Viewer, { ownerId, visibility }: Pick<Machine, 'ownerId' | 'visibility'>): boolean {
  return visibility === 'public' || (viewer.kind === 'member' && viewer.id === ownerId);
}
