import type { Knex } from 'knex';
import type { CombinedReading } from '#domain/marks/combine-readings.ts';
import { settleReadings } from '#domain/marks/settle-readings.ts';
import type { FactName } from '#db/models/fact-name.ts';
import { Mark } from '#db/models/mark.ts';
import { Reading } from '#db/models/reading.ts';
import { markRights, requireMayReadMark } from '#server/policies/marks.ts';
import type { MarkRights } from '#server/policies/marks.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { MARK_GRAPH, namesOf, viewOf } from './load-marks.ts';
import type { MarkInView } from './load-marks.ts';
import { madeReading } from './settle-mark.ts';

export type MarkOnRecord = MarkInView & {
  /** Newest first, each with whether a later one by the same reader stands in its place; none for whom they are hidden from. */
  readonly readings: readonly { readonly reading: Reading; readonly replaced: boolean }[];
  /** How the reading in force was worked out; `null` where no reading is independent, and for whom it is hidden from. */
  readonly inForce: CombinedReading | null;
  readonly cipher: FactName | null;
  readonly can: MarkRights;
};

/**
 * A mark, as far as the viewer may see it.
 *
 * @throws ProblemError `not-found` for one that is not there, stands on something that is not for the viewer to see, or tells a serial that is not
 *   shown.
 */
export async function readMark(viewer: Viewer, id: string, knex: Knex): Promise<MarkOnRecord> {
  const mark = requireMayReadMark(viewer, await Mark.query(knex).findById(id).withGraphFetched(MARK_GRAPH));
  const inView = (await viewOf([mark], viewer, knex))(mark);
  const readings = inView.isHidden ? [] : await Reading.query(knex).where({ markId: id }).modify('newestFirst').withGraphFetched('reader');
  const place = { hasPhoto: (mark.photos ?? []).length > 0, isPublic: mark.part?.visibility === 'public' };
  const ciphers = await namesOf([mark.decoding?.cipherId], knex);
  return {
    ...inView,
    readings: withReplaced(readings),
    inForce: settleReadings(readings.map(madeReading), place).inForce,
    cipher: ciphers.get(mark.decoding?.cipherId ?? '') ?? null,
    can: markRights(viewer, mark),
  };
}

/** Newest first. One made after looking at others’ takes no independent one’s place. */
function withReplaced(readings: readonly Reading[]): MarkOnRecord['readings'] {
  return readings.map((reading, place) => {
    const standsInItsPlace = (later: Reading): boolean =>
      later.readerId === reading.readerId && later.takenBackAt === null && (later.independent || !reading.independent);
    return { reading, replaced: reading.takenBackAt === null && readings.slice(0, place).some(standsInItsPlace) };
  });
}
