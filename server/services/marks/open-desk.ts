import type { Knex } from 'knex';
import { countingReadings } from '#domain/marks/settle-readings.ts';
import { Mark } from '#db/models/mark.ts';
import { Reading } from '#db/models/reading.ts';
import { readsBlind, requireMayReadMark } from '#server/policies/marks.ts';
import { signedIn } from '#server/policies/viewer.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { MARK_GRAPH, viewOf } from './load-marks.ts';
import type { MarkInView } from './load-marks.ts';
import { madeReading } from './settle-mark.ts';

export type DeskOnRecord = {
  readonly inView: MarkInView;
  /** Nothing that others read or claim is for the reader to know. */
  readonly isBlind: boolean;
  /** No reading of it stands. */
  readonly isFirst: boolean;
  /** The viewer's reading that counts, as far as it is up to them. */
  readonly mine: Reading | null;
};

/**
 * What a member needs to read a mark.
 *
 * @throws ProblemError `not-signed-in`, `not-found`.
 */
export async function openDesk(viewer: Viewer, id: string, knex: Knex): Promise<DeskOnRecord> {
  const member = signedIn(viewer);
  const mark = requireMayReadMark(member, await Mark.query(knex).findById(id).withGraphFetched(MARK_GRAPH));
  const inView = (await viewOf([mark], member, knex))(mark);
  const standing = await Reading.query(knex).where({ markId: id }).whereNull('takenBackAt');
  const own = standing.filter(({ readerId }) => readerId === member.id);
  const [counting] = countingReadings(own.map(madeReading));
  return {
    inView,
    isBlind: readsBlind(inView.acquaintance),
    isFirst: standing.length === 0,
    mine: own.find((reading) => reading.id === counting?.id) ?? null,
  };
}
