import type { Knex } from 'knex';
import { parseReading } from '#domain/marks/reading.ts';
import type { MarkKind } from '#domain/vocabulary.ts';
import { TELLS_SERIAL } from '#server/policies/marks.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { listPage } from '#server/services/list-page.ts';
import type { ListRequest, Order, Page } from '#server/services/list-page.ts';
import { matchText } from '#server/services/search.ts';
import { wrongValue } from '#server/services/wrong-value.ts';
import { whereNotHidden } from './acquaintances.ts';
import { loadMarks } from './load-marks.ts';
import type { MarkInView } from './load-marks.ts';
import { whereMaySay } from './reading-pattern.ts';

const READ = [{ column: 'marks.readAt', as: 'instant-if-any' }] as const;
const ORDERS = {
  '-read': { keys: READ, direction: 'desc' },
  read: { keys: READ, direction: 'asc' },
  reading: { keys: [{ column: 'marks.readingKey', as: 'beginning' }], direction: 'asc' },
} as const satisfies Record<string, Order>;

export type MarkListing = ListRequest<keyof typeof ORDERS> & {
  readonly q?: string | undefined;
  /** In the mark notation. */
  readonly number?: string | undefined;
  readonly kind?: MarkKind | undefined;
  readonly maker?: string | undefined;
  /** Days, ISO. */
  readonly from?: string | undefined;
  readonly to?: string | undefined;
  readonly hasPhoto?: boolean | undefined;
  readonly wantsReading?: boolean | undefined;
};

/**
 * The public record of marks. Where it is narrowed or ordered by what marks say or mean, those are left out of which that is kept from the viewer: a
 * second reader learns nothing from whether a mark is found, nor from where it stands.
 *
 * @throws ProblemError `invalid` at `number`, `to` or `after`.
 */
export async function listMarks(viewer: Viewer, request: MarkListing, knex: Knex): Promise<Page<MarkOnList>> {
  const reading = request.number === undefined ? undefined : parseReading(request.number);
  if (reading?.ok === false) throw wrongValue(['number'], reading.fault.message);
  const { q, kind, maker, from, to, hasPhoto, wantsReading, sort } = request;
  if (from !== undefined && to !== undefined && to < from) throw wrongValue(['to'], 'Ends before it begins');
  const tells = reading !== undefined || from !== undefined || to !== undefined || sort === 'reading';
  return listPage(
    {
      table: 'marks',
      orders: ORDERS,
      request,
      filter: (query) => {
        joinWhatTheyStandOn(query);
        if (reading !== undefined) whereMaySay(query, reading.value);
        if (tells) whereNotHidden(query, viewer, knex);
        if (from !== undefined || to !== undefined) void query.whereExists(datesBetween(from, to, knex));
        if (kind) void query.where('marks.kind', kind);
        if (maker) void query.where('makers.slug', maker);
        if (hasPhoto !== undefined) query[hasPhoto ? 'whereExists' : 'whereNotExists'](photosOf(knex));
        if (wantsReading !== undefined) query[wantsReading ? 'whereNotNull' : 'whereNull']('marks.wantsReadingSince');
        if (q) whereNames(query, q, viewer, knex);
      },
      load: async (ids, trx) => (await loadMarks(ids, viewer, trx)).map((inView) => ({ id: inView.mark.id, inView })),
    },
    knex,
  );
}

export type MarkOnList = { readonly id: string; readonly inView: MarkInView };

/** Marks on public parts, and those on public machines that tell no serial their owners don't show. */
function joinWhatTheyStandOn(query: Knex.QueryBuilder): void {
  void query
    .leftJoin('parts', 'parts.id', 'marks.partId')
    .leftJoin('part_types', 'part_types.id', 'parts.partTypeId')
    .leftJoin('part_origins', 'part_origins.partId', 'parts.id')
    .leftJoin('makers', 'makers.id', 'part_origins.makerId')
    .leftJoin('machines', 'machines.id', 'marks.machineId')
    .where((place) => {
      void place.where('parts.visibility', 'public').orWhere((onMachine) => {
        void onMachine.where('machines.visibility', 'public').where((shown) => void shown.where('machines.serialShown', true).orWhereNotIn('marks.kind', [...TELLS_SERIAL]));
      });
    });
}

/** What everybody may know of a mark, and of those not hidden what their holders call the part and what is read. */
function whereNames(query: Knex.QueryBuilder, text: string, viewer: Viewer, knex: Knex): void {
  void query.where((any) => {
    matchText(any, ['makers.name', 'part_types.name'], text);
    void any.orWhere((told) => {
      whereNotHidden(told, viewer, knex);
      matchText(told, ['parts.called', 'marks.reading', 'marks.readingKey'], text);
    });
  });
}

/** A date it can mean lies between these, both included. Days in ISO 8601 are in order as text. */
function datesBetween(from: string | undefined, to: string | undefined, knex: Knex): Knex.QueryBuilder {
  const query = knex(knex.raw('mark_decodings, jsonb_array_elements(mark_decodings.candidates) as candidate'))
    .where('mark_decodings.markId', knex.ref('marks.id'))
    .select(knex.raw('1'));
  if (from !== undefined) void query.whereRaw(`candidate ->> 'to' >= ?`, [from]);
  if (to !== undefined) void query.whereRaw(`candidate ->> 'from' <= ?`, [to]);
  return query;
}

function photosOf(knex: Knex): Knex.QueryBuilder {
  return knex('mark_photos').where('mark_photos.markId', knex.ref('marks.id')).select(knex.raw('1'));
}
