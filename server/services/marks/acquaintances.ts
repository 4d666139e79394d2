import type { Knex } from 'knex';
import { z } from 'zod';
import { MarkLook } from '#db/models/mark-look.ts';
import type { Mark } from '#db/models/mark.ts';
import { Reading } from '#db/models/reading.ts';
import { holderOf } from '#server/policies/marks.ts';
import type { Acquaintance } from '#server/policies/marks.ts';
import type { Viewer } from '#server/policies/viewer.ts';

const Readers = z.array(z.object({ markId: z.string(), byViewer: z.boolean(), byOthers: z.boolean() }));

/** What the viewer and others had to do with each of some marks, loaded with what they stand on: part or machine. */
export async function acquaintances(viewer: Viewer, marks: readonly Mark[], knex: Knex): Promise<(mark: Mark) => Acquaintance> {
  const viewerId = viewer.kind === 'member' ? viewer.id : null;
  const ids = marks.map(({ id }) => id);
  const rows = await Reading.query(knex)
    .whereIn('markId', ids)
    .groupBy('markId')
    .select(
      'markId',
      knex.raw('coalesce(bool_or(reader_id = ?::uuid), false) as by_viewer', [viewerId]),
      knex.raw('bool_or(reader_id is distinct from ?::uuid) as by_others', [viewerId]),
    )
    .castTo<unknown>();
  const readers = new Map(Readers.parse(rows).map((row) => [row.markId, row]));
  const looks = viewerId === null ? [] : await MarkLook.query(knex).where({ memberId: viewerId }).whereIn('markId', ids);
  const looked = new Set(looks.map(({ markId }) => markId));
  return (mark) => ({
    isHolder: viewerId !== null && holderOf(mark) === viewerId,
    wantsReading: mark.wantsReadingSince !== null,
    readByOthers: readers.get(mark.id)?.byOthers ?? false,
    readByViewer: readers.get(mark.id)?.byViewer ?? false,
    hasLooked: looked.has(mark.id),
  });
}

/** Of a query of marks joined with their parts, those of which nothing is kept from the viewer: `isHidden` in SQL. */
export function whereNotHidden(query: Knex.QueryBuilder, viewer: Viewer, knex: Knex): void {
  if (viewer.kind === 'visitor') return;
  void query.where((shown) => {
    void shown
      .whereNull('marks.wantsReadingSince')
      .orWhere('parts.holderId', viewer.id)
      .orWhereNotExists(knex('readings').where('readings.markId', knex.ref('marks.id')).select(knex.raw('1')));
    for (const mine of readOrLookedAtBy(viewer.id, knex)) void shown.orWhereExists(mine);
  });
}

/** Of a query of marks: the readings and the looks of a member, one query each. */
export function readOrLookedAtBy(memberId: string, knex: Knex): readonly Knex.QueryBuilder[] {
  return [
    knex('readings').where('readings.markId', knex.ref('marks.id')).where('readings.readerId', memberId).select(knex.raw('1')),
    knex('mark_looks').where('mark_looks.markId', knex.ref('marks.id')).where('mark_looks.memberId', memberId).select(knex.raw('1')),
  ];
}
