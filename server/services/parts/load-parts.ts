import type { Knex } from 'knex';
import type { FactName } from '#db/models/fact-name.ts';
import { Mark } from '#db/models/mark.ts';
import type { PartFitting } from '#db/models/part-fitting.ts';
import { Part } from '#db/models/part.ts';
import { isHolder } from '#server/policies/parts.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { groupedBy } from '#server/services/grouped-by.ts';
import { fittingsNow, loadMarks, mayKnowMachine, namesOf } from '#server/services/marks/load-marks.ts';
import type { MarkInView } from '#server/services/marks/load-marks.ts';

/** A part as one viewer sees it. */
export type PartInView = {
  readonly viewer: Viewer;
  /** With type, maker, casting, where it was found, and its photos. */
  readonly part: Part;
  /** Those put on record first come first. */
  readonly marks: readonly MarkInView[];
  readonly isMine: boolean;
  /** Some mark of it is hidden from the viewer, and with it what its holder claims the part to be. */
  readonly isClaimHidden: boolean;
  readonly casting: FactName | null;
  /** Where it is now; `null`: on no machine, or on one that is not for the viewer to know of. */
  readonly fitting: PartFitting | null;
};

export const PART_GRAPH = '[partType, maker, casting.[maker], foundModel, photos.photo.picture.files]';

/** Parts by id, in any order; whether the viewer may see them is the caller's to know. */
export async function loadParts(ids: readonly string[], viewer: Viewer, knex: Knex): Promise<readonly PartInView[]> {
  const parts = await Part.query(knex).findByIds([...ids]).withGraphFetched(PART_GRAPH);
  return parts.map(await viewOfParts(parts, viewer, knex));
}

/** How the viewer sees each of some parts with `PART_GRAPH`. */
export async function viewOfParts(parts: readonly Part[], viewer: Viewer, knex: Knex): Promise<(part: Part) => PartInView> {
  const ids = parts.map(({ id }) => id);
  const markIds = (await Mark.query(knex).whereIn('partId', ids).select('id')).map(({ id }) => id);
  const marks = groupedBy((await loadMarks(markIds, viewer, knex)).toSorted(inOrderOfRecord), ({ mark }) => mark.partId);
  const castings = await namesOf(parts.map(({ castingId }) => castingId), knex);
  const fittings = await fittingsNow(ids, knex);
  return (part) => {
    const own = marks.get(part.id) ?? [];
    const isMine = isHolder(viewer, part);
    const fitting = fittings.get(part.id);
    return {
      viewer,
      part,
      marks: own,
      isMine,
      isClaimHidden: own.some(({ isHidden }) => isHidden),
      casting: castings.get(part.castingId ?? '') ?? null,
      fitting: fitting?.machine && (isMine || mayKnowMachine(viewer, fitting.machine)) ? fitting : null,
    };
  };
}

/** Ids are in the order in which they were made. */
function inOrderOfRecord({ mark: one }: MarkInView, { mark: other }: MarkInView): number {
  return one.id < other.id ? -1 : 1;
}
